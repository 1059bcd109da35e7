// ofCopy: readings a second out of a logger's file to committed, by the worker's job (decoded, split, times in a zone,
// kept keys, due hours and all) ÷ raw COPY of as many rows in commit batches of the same size.
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { cloneDatabase } from '../support/clone';
import { makeTemplate, releaseTemplate } from '../support/cluster';
import { ratio, round3 } from './support';

const COLUMNS = 6;
const LINES = 20_000;
const ROWS = LINES * COLUMNS;
const MINUTE_MS = 60_000;

export async function bench() {
  const cluster = await makeTemplate();
  const database = await cloneDatabase(cluster);
  // before anything that reads the environment is loaded
  process.env['DATABASE_URL'] = database.url;
  process.env['DATA_DIR'] = mkdtempSync(path.join(tmpdir(), 'middenward-bench-'));
  process.env['AUTH_SECRET'] = 'only-for-benchmarks-only-for-benchmarks-only';
  const { default: pino } = await import('pino');
  const { everyHolding, everyPool, closePools } = await import('@/db/client');
  const imports = await import('@/db/queries/import');
  const { createPoint } = await import('@/db/queries/point');
  const { storeReadings } = await import('@/db/queries/reading-write');
  const { PointCreate } = await import('@/lib/schema/point');
  const { importFile, writePiece } = await import('@/lib/server/import-file');
  const { clockFrom } = await import('@/worker/clock');
  const { runImports } = await import('@/worker/jobs/import-run');
  const { makeScene } = await import('../support/field-scene');
  try {
    const { holding, houseId } = await makeScene();
    const keys = Array.from({ length: COLUMNS }, (_, column) => `logger-${column}`);
    for (const key of keys) {
      const point = PointCreate.parse({ key, name: key, role: 'other', unit: 'Cel' });
      await createPoint(holding, houseId, point, 'bench');
    }
    const deps = {
      ...{ pool: everyPool(), db: everyHolding(), log: pino({ level: 'silent' }), isLeading: () => true },
      clock: clockFrom({ rate: 1, realAt: 0, appAt: 0 }),
    };
    // between two changes of the clock, which skip or double an hour of lines
    let at = Date.parse('2020-04-01T00:00:00Z');
    /** A file that goes on where the last one ended, announced, sent and looked through as a person would. */
    const prepare = async () => {
      const lines = Array.from({ length: LINES }, (_, line) => {
        const time = new Date(at + line * MINUTE_MS).toISOString().slice(0, 19).replace('T', ' ');
        return `${time};${keys.map((_key, column) => `${(line + column) % 40},${line % 10}`).join(';')}\n`;
      });
      at += LINES * MINUTE_MS;
      const bytes = Buffer.from(`time;${keys.join(';')}\n${lines.join('')}`);
      const act = { by: 'bench', now: new Date(), name: 'bench.csv', bytes: bytes.length };
      const { id } = await imports.createImport(holding, houseId, act);
      await writePiece(importFile(id), 0, bytes);
      await imports.noteReceived(holding, id, bytes.length);
      await imports.moveImport(holding, id, ['received'], 'to-check', {
        ...{ encoding: 'utf-8', delimiter: ';', decimal: ',', headLines: 1, timeColumns: [0] },
        time: { order: 'ymd', zone: 'Europe/London', twice: 'by-order', skipped: 'before-gap' },
        columns: keys.map((point, column) => ({ column: column + 1, point, unit: 'Cel' as const })),
      });
      await runImports(deps);
      return id;
    };
    const waiting: string[] = [];
    // two rounds are thrown away, seven count
    for (let round = 0; round < 9; round += 1) waiting.push(await prepare());
    let batches = 1;
    let copied = 0;
    const brought: number[] = [];
    const { raw, ...ofCopy } = await ratio(
      // the baseline first, so that the ratio of times is the ratio of rates
      async () => {
        const rows = Math.ceil(ROWS / batches);
        for (let batch = 0; batch < batches; batch += 1) {
          const first = copied;
          copied += rows;
          await storeReadings(
            everyPool(),
            Array.from({ length: rows }, (_, row) => ({
              point: 1_000_000 + (row % COLUMNS),
              at: Date.parse('2020-01-01T00:00:00Z') + (first + row) * 1000,
              value: row % 40,
              quality: 0 as const,
            })),
          );
        }
      },
      async () => {
        const id = waiting.shift() ?? '';
        await imports.moveImport(holding, id, ['checked'], 'to-bring');
        await runImports(deps);
        const one = await imports.findImport(holding, houseId, id);
        brought.push(one?.brought ?? 0);
        const parts = await everyPool().query<{ parts: number }>(
          'select max(part) as parts from import_part where batch_id = $1',
          [id],
        );
        batches = parts.rows[0]?.parts ?? 1;
      },
    );
    if (brought.some((count) => count !== ROWS)) throw new Error(`not all came in: ${brought.join()}`);
    const perS = (ms: number[]) => ms.map((one) => Math.round(ROWS / (one / 1000)));
    return {
      ofCopy,
      readingsPerS: perS(raw.baseline),
      copyPerS: perS(raw.subject),
      rowsACommit: round3(ROWS / batches),
      rows: ROWS,
    };
  } finally {
    await closePools();
    await database.drop();
    await releaseTemplate();
  }
}
