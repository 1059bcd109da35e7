/** Parts of the example node that the wire does not show: its board under /sys, and what is on its disk. */
import { appendFileSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';

interface Board {
  open(): Promise<void>;
  set(relay: number, coil: 'on' | 'off'): void;
  get(relay: number): 'on' | 'off';
  read(point: string): Promise<number | null>;
}
interface Entry {
  record: SenmlRecord;
  seq: number | null;
}
interface SenmlRecord {
  n: string;
  u: string;
  v: number;
  t: number;
}
interface Store {
  size: number;
  add(records: SenmlRecord[]): void;
  newest(): Entry[];
  oldest(): Entry[];
  acknowledged(seq: number): void;
}
interface Coils {
  state(): { channels: Record<string, string>; trips: number };
  tryAgain(): boolean;
  sent(seq: number, nowMs: number): void;
  command(frame: object, nowMs: number): { ignored?: string };
  expire(nowMs: number): boolean;
}

// plain programs without types: a stranger's
const part = async (name: string): Promise<unknown> =>
  import(pathToFileURL(path.resolve('examples/node', `${name}.mjs`)).href);
const { sysfs } = (await part('hardware')) as { sysfs: (settings: object) => Board };
const { Readings } = (await part('store')) as { Readings: new (folder: string) => Store };
const { Relays } = (await part('relays')) as {
  Relays: new (outputs: object, count: number, boot: string, nowMs: number) => Coils;
};

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'example node '));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe('relays and sensors under /sys', () => {
  const file = (...parts: string[]) => path.join(folder, ...parts);
  const line = (gpio: number) => readFileSync(file('gpio', `gpio${gpio}`, 'value'), 'utf8');
  const direction = (gpio: number) => readFileSync(file('gpio', `gpio${gpio}`, 'direction'), 'utf8');

  function board(): Board {
    for (const gpio of [17, 27]) {
      mkdirSync(file('gpio', `gpio${gpio}`), { recursive: true });
      for (const name of ['value', 'direction', 'active_low'])
        writeFileSync(file('gpio', `gpio${gpio}`, name), '1');
    }
    for (const probe of ['28-new', '28-old', '28-bad']) mkdirSync(file('w1', probe), { recursive: true });
    // the forms of the kernel's Documentation/w1/slaves/w1_therm.rst
    writeFileSync(file('w1', '28-new', 'temperature'), '3437\n');
    const raw = '37 00 4b 46 7f ff 0c 10 1c : crc=1c';
    writeFileSync(file('w1', '28-old', 'w1_slave'), `${raw} YES\n37 00 4b 46 7f ff 0c 10 1c t=-1062\n`);
    writeFileSync(file('w1', '28-bad', 'w1_slave'), `${raw} NO\n37 00 4b 46 7f ff 0c 10 1c t=21312\n`);
    writeFileSync(file('humidity'), '81250\n');
    return sysfs({
      ...{ gpioRoot: file('gpio'), w1Root: file('w1') },
      relays: [{ gpio: 17, activeLow: true }, { gpio: 27 }],
      points: [
        { key: 'bench-1', unit: 'Cel', w1: '28-new' },
        { key: 'bench-2', unit: 'Cel', w1: '28-old' },
        { key: 'bench-3', unit: 'Cel', w1: '28-bad' },
        { key: 'humidity', unit: '%RH', file: file('humidity'), times: 0.001 },
        { key: 'gone', unit: 'Cel', w1: '28-gone' },
      ],
    });
  }

  test('lines begin at the level at which their coil is off, on either kind of board', async () => {
    await board().open();
    expect([direction(17), direction(27)]).toEqual(['high', 'low']);
  });

  test('a coil is on at a low line where the board says so, and is read back', async () => {
    const one = board();
    await one.open();
    one.set(1, 'on');
    one.set(2, 'on');
    expect([line(17), line(27)]).toEqual(['0', '1']);
    expect([one.get(1), one.get(2)]).toEqual(['on', 'on']);
    one.set(1, 'off');
    expect([line(17), one.get(1)]).toEqual(['1', 'off']);
  });

  test('a probe is read by either file; one whose checksum failed, or that is gone, says nothing', async () => {
    const one = board();
    const values = ['bench-1', 'bench-2', 'bench-3', 'humidity', 'gone'].map((key) => one.read(key));
    expect(await Promise.all(values)).toEqual([3.437, -1.062, null, 81.25, null]);
  });
});

describe('readings on the disk', () => {
  const at = (t: number, n = 'bench-1'): SenmlRecord => ({ n, u: 'Cel', v: 4, t });

  test('are there after a power cut, but for a line that it tore', () => {
    new Readings(folder).add([at(100), at(130)]);
    appendFileSync(path.join(folder, 'readings.jsonl'), '{"n":"bench-1","t":16');
    expect(new Readings(folder).oldest().map(({ record }) => record.t)).toEqual([100, 130]);
  });

  test('leave it when they are acknowledged, and not before', () => {
    const store = new Readings(folder);
    store.add([at(100), at(130)]);
    for (const entry of store.newest()) entry.seq = 7;
    store.acknowledged(6);
    expect(new Readings(folder).size).toBe(2);
    store.acknowledged(7);
    for (const entry of store.oldest()) entry.seq = 8;
    store.acknowledged(8);
    expect([store.size, new Readings(folder).size]).toEqual([0, 0]);
  });

  test('of a whole day at 30 s are kept, and in packs of a hundred', () => {
    const store = new Readings(folder);
    const day = Array.from({ length: 2880 }, (_, i) => at(1_000_000 + i * 30));
    store.add(day);
    expect(store.size).toBe(2880);
    expect(store.oldest()).toHaveLength(100);
    store.add([at(1_000_000 + 3 * 86_400)]);
    expect(store.size).toBe(1);
  });
});

describe('an output that cannot be written', () => {
  test('does not keep the others from dropping, is never told as on, and is tried again', () => {
    const coils = ['off', 'off'];
    let isStuck = false;
    const outputs = {
      set: (relay: number, coil: string) => {
        if (isStuck && relay === 1) throw new Error('no such device');
        coils[relay - 1] = coil;
      },
      get: (relay: number) => {
        if (isStuck && relay === 1) throw new Error('no such device');
        return coils[relay - 1];
      },
    };
    const relays = new Relays(outputs, 2, 'b', 0);
    relays.sent(1, 0);
    const command = { number: 5, lease: 30, boot: 'b', seen: 1, channels: { '1': 'on', '2': 'on' } };
    expect(relays.command(command, 10).ignored).toBeUndefined();
    isStuck = true;
    expect(relays.expire(30_000)).toBe(true);
    expect(coils).toEqual(['on', 'off']);
    expect(relays.state()).toMatchObject({ channels: { '2': 'off' }, trips: 1 });
    expect(relays.state().channels['1']).toBeUndefined();
    isStuck = false;
    expect(relays.tryAgain()).toBe(true);
    expect(coils).toEqual(['off', 'off']);
  });
});
