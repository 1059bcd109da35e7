// A holding with one of everything, so that each path of the interface has something to speak of.
import type { Holding } from '@/db/client';
import { raiseAlarm } from '@/db/queries/alarm';
import type { Asker, Json } from './asker';
import { picture } from './picture';
import * as shown from './shown';

export interface Furnished {
  house: string;
  ids: Record<string, string>;
  /** The path with each brace filled by something of this holding. */
  pathOf: (path: string) => string;
  /** The same with ids that nothing has. */
  missingOf: (path: string) => string;
  /** Texts that no other holding may ever be told. */
  traces: string[];
}

const NOTHING = '018f3f3f-0000-7000-8000-000000000000';
/** What a list or a chart must be asked with. */
const QUERY: Record<string, string> = {
  '/houses/{house}/readings': '?points=bench-1',
  '/houses/{house}/interlock-replay': '?channel=ridge-vent&kind=never-with&other=gate-heap-fan',
  '/houses/{house}/heap-findings': '?source=gate-heap',
  '/houses/{house}/imports/{import}/piece': '?from=0',
  '/archives/{archive}/piece': '?from=0',
  '/houses/{house}/export/readings': '?points=bench-1&from=2026-11-01T00:00:00Z&to=2026-11-02T00:00:00Z',
  '/houses/{house}/export/switchings': '?from=2026-11-01T00:00:00Z&to=2026-11-02T00:00:00Z',
};

export async function furnish(holding: Holding, owner: Asker): Promise<Furnished> {
  const ids: Record<string, string> = {};
  const keep = async (name: string, path: string, body: object | Uint8Array): Promise<Json> => {
    const made = await owner.make(path, body);
    ids[name] = String(made['id']);
    return made;
  };
  await keep('house', '/houses', shown.house);
  const at = '/houses/long-house';
  await keep('node', `${at}/nodes`, shown.node);
  await owner.make(`${at}/nodes`, shown.board);
  for (const point of shown.otherPoints) await owner.make(`${at}/points`, point);
  await keep('point', `${at}/points`, shown.bench);
  await keep('testRead', `${at}/test-reads`, {
    node: 'MB-1',
    table: 'input',
    address: 0,
    type: 's16',
    unit: 'Cel',
  });
  await keep('source', `${at}/sources`, shown.source);
  await owner.make(`${at}/channels`, shown.vent);
  await keep('channel', `${at}/channels`, shown.fan);
  await keep('loop', `${at}/loops`, shown.loop);
  await keep('interlock', `${at}/interlocks`, shown.interlock);
  await keep('rule', `${at}/rules`, shown.rule);
  await keep('lockout', `${at}/lockouts`, { channel: 'ridge-vent', why: 'the arm is being mended' });
  await keep('proof', `${at}/proofs`, { channel: 'gate-heap-fan' });
  await keep('picture', `${at}/proofs/${ids['proof']}/photographs?shows=plate`, await picture());
  await keep('entry', `${at}/heap-entries`, { source: 'gate-heap', kind: 'watered', text: 'forty litres' });
  await keep('photograph', `${at}/heap-entries/${ids['entry']}/photographs`, await picture());
  await keep('round', `${at}/probe-sets`, shown.round);
  await keep('job', `${at}/heap-jobs`, { source: 'gate-heap', title: 'Build', dueOn: '2027-09-15' });
  await keep('dismissal', `${at}/heap-dismissals`, {
    ...{ source: 'gate-heap', kind: 'dry', mark: 'since x', level: 1, why: 'the hose is frozen' },
  });
  await keep('import', `${at}/imports`, { name: 'bench.csv', bytes: 100 });
  await keep('material', '/materials', shown.material);
  await keep('cost', `${at}/heap-costs`, {
    source: 'gate-heap',
    kind: 'pipe',
    on: '2026-10-03',
    amount: '85',
  });
  await keep('schedule', `${at}/report-schedules`, { span: 'week', to: ['owner@larkmoor.example'] });
  await keep('archive', '/archives/out', {});
  await keep('calendar', '/calendar-links', {});
  await keep('invitation', '/invitations', { email: 'invited@larkmoor.example', role: 'grower' });
  await keep('key', '/api-keys', { name: 'a key to end', role: 'grower' });
  ids['member'] = String(((await owner.get('/people')).body['items'] as Json[])[0]?.['id']);
  await raiseAlarm(holding, {
    houseId: ids['house'] ?? null,
    key: 'frost',
    kind: 'frost',
    about: { point: 'bench-1' },
    data: { value: 0.5 },
    at: Date.now(),
  });
  ids['alarm'] = String(((await owner.get('/alarms')).body['items'] as Json[])[0]?.['id']);
  const fill = (path: string, of: (name: string) => string) =>
    path.replace(/\{(\w+)\}/g, (_all, name: string) => of(name)) + (QUERY[path] ?? '');
  return {
    house: 'long-house',
    ids,
    pathOf: (path) => fill(path, (name) => ids[name] ?? `no ${name} was made`),
    missingOf: (path) => fill(path, () => NOTHING),
    traces: [...Object.values(ids), 'Long house', 'larkmoor'],
  };
}
