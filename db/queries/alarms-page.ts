/** What the page Alarms shows, and the names that its sentences need. */
import type { Holding } from '@/db/client';
import { alarmEvents, listAlarms, type Alarm, type AlarmEvent } from './alarm';
import { listChannels } from './channel';
import { listPoints } from './point';
import { listSources } from './source';

export interface AlarmNames {
  points: { key: string; name: string; role: string; unit: string }[];
  channels: { key: string; label: string; loadKind: string }[];
  sources: { slug: string; name: string }[];
}

export interface AlarmsPage {
  standing: Alarm[];
  history: (Alarm & { events: AlarmEvent[] })[];
  /** Where the next page of the history begins; null at its end. */
  older: { at: number; id: string } | null;
  names: AlarmNames;
}

const HISTORY_LIMIT = 50;
/** More standing alarms than this say one thing together, and the list would only hide it. */
const STANDING_LIMIT = 100;

export async function readAlarms(
  holding: Holding,
  houseId: string,
  before: { at: number; id: string } | undefined,
): Promise<AlarmsPage> {
  const standing = await listAlarms(holding, { state: 'active', houseId, limit: STANDING_LIMIT });
  const rows = await listAlarms(holding, {
    state: 'history',
    houseId,
    ...(before === undefined ? {} : { before }),
    limit: HISTORY_LIMIT + 1,
  });
  const history = rows.slice(0, HISTORY_LIMIT);
  const last = history.at(-1);
  const events = await alarmEvents(
    holding,
    history.map((alarm) => alarm.id),
  );
  return {
    standing,
    history: history.map((alarm) => ({ ...alarm, events: events.get(alarm.id) ?? [] })),
    older: rows.length > HISTORY_LIMIT && last !== undefined ? { at: last.raisedAt, id: last.id } : null,
    names: await alarmNames(holding, houseId),
  };
}

/** Names of what alarms of a house may be about. */
export async function alarmNames(holding: Holding, houseId: string): Promise<AlarmNames> {
  const points = await listPoints(holding, houseId);
  const channels = await listChannels(holding, houseId);
  const sources = await listSources(holding, houseId);
  return {
    points: points.map(({ key, name, role, unit }) => ({ key, name, role, unit })),
    channels: channels.map(({ key, label, load }) => ({ key, label, loadKind: load.kind })),
    sources: sources.map(({ slug, name }) => ({ slug, name })),
  };
}
