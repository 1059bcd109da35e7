/** A report of a house over a week, a month or a winter: the nights of Duty, the book, the alarms, and the money. */
import type { Holding } from '@/db/client';
import { nightNamed, nightOf } from '@/lib/analysis/night';
import type { NightSummary } from '@/lib/analysis/nights';
import { type Span, type SpanOfNights, spanBefore, spanOfNight } from '@/lib/analysis/report-span';
import type { ReportSection } from '@/lib/schema/report';
import type { House } from '@/lib/schema/yard-view';
import { toLocal } from '@/lib/units/local-time';
import type { Preferences } from '@/lib/units/preferences';
import {
  figuresBlock,
  nightsBlock,
  recoveryBlock,
  type ReportBlock,
  type ReportSource,
  spanWords,
} from '@/lib/wording/report';
import { alarmsBlock, bookBlock, provingRows } from '@/lib/wording/report-record';
import { moneyBlock } from '@/lib/wording/report-money';
import type { Scene } from '@/lib/wording/scene';
import { alarmEvents } from './alarm';
import { alarmNames } from './alarms-page';
import { listChannels } from './channel';
import { alarmsIn, entriesIn } from './duty-night';
import { readRecovery } from './duty-recovery';
import { readMoney } from './money-page';
import { listHouses } from './house';
import { listNights } from './night';
import { lastProofs } from './proof';
import { listSources } from './source';

export interface ReportAsk {
  span: Span;
  /** A night of the span; left out or unreadable, that which lasts. */
  night?: string | undefined;
  sections: readonly ReportSection[];
}

export interface Report {
  house: { slug: string; name: string };
  title: string;
  span: SpanOfNights;
  before: SpanOfNights;
  /** Null for the span that lasts. */
  after: SpanOfNights | null;
  blocks: ReportBlock[];
  /** For the charts, ascending. */
  sources: { slug: string; name: string; nights: NightSummary[] }[];
}

const MOST_NIGHTS = 400;

export async function readReport(
  holding: Holding,
  house: House,
  ask: ReportAsk,
  preferences: Preferences,
  nowMs: number,
): Promise<Report> {
  const lasting = nightOf(nowMs, house.zone).night;
  const asked = ask.night !== undefined && isNight(ask.night, house.zone) ? ask.night : lasting;
  const span = spanOfNight(ask.span, asked > lasting ? lasting : asked, house.latitude);
  const has = (section: ReportSection) => ask.sections.includes(section);
  const scene = await sceneOf(holding, house, preferences, nowMs);
  const [from, to] = [nightNamed(span.from, house.zone).from, nightNamed(span.to, house.zone).to];
  const blocks: (ReportBlock | null)[] = [];
  const sources: Report['sources'] = [];
  const entries = [];
  for (const one of await listSources(holding, house.id)) {
    const wanted = { sources: [one.slug], from: span.from, to: span.to, limit: MOST_NIGHTS };
    const nights = (await listNights(holding, house.id, wanted, nowMs)).reverse();
    const book = await entriesIn(holding, one.id, from, to);
    entries.push(...book.map((entry) => ({ ...entry, source: one.name })));
    const recovery =
      has('recovery') && (one.kind === 'heap' || one.kind === 'ground')
        ? await readRecovery(holding, one.id, nights, book)
        : null;
    const source: ReportSource = { name: one.name, nights, recovery };
    sources.push({ slug: one.slug, name: one.name, nights });
    if (has('figures')) blocks.push(figuresBlock(source, house, preferences));
    // of a source that did nothing there is nothing more to say
    if (nights.length === 0) continue;
    if (has('nights')) blocks.push(nightsBlock(source, preferences));
    if (has('recovery')) blocks.push(recoveryBlock(source, house.zone, preferences));
    if (has('money')) blocks.push(await moneyOf(holding, house, one, nowMs, Math.min(to - 1, nowMs)));
  }
  if (has('book'))
    blocks.push(
      bookBlock(
        entries.sort((a, b) => a.at - b.at),
        scene,
      ),
    );
  if (has('alarms')) blocks.push(await alarmsOf(holding, house, from, to, scene));
  const after = spanBefore(span, -1, house.latitude);
  return {
    house: { slug: house.slug, name: house.name },
    ...{ title: spanWords(span), span, sources },
    before: spanBefore(span, 1, house.latitude),
    after: after.from > lasting ? null : after,
    blocks: blocks.filter((block) => block !== null),
  };
}

async function moneyOf(
  holding: Holding,
  house: House,
  source: { slug: string; name: string },
  nowMs: number,
  inSeasonMs: number,
) {
  const { book, season, balance } = await readMoney(holding, house, source.slug, nowMs, inSeasonMs);
  if (balance === null) return null;
  return moneyBlock({ source: source.name, season: season.name, currency: book.currency, balance });
}

async function alarmsOf(holding: Holding, house: House, from: number, to: number, scene: Scene) {
  const alarms = await alarmsIn(holding, house.id, from, to);
  const events = await alarmEvents(
    holding,
    alarms.map((alarm) => alarm.id),
  );
  const block = alarmsBlock(
    alarms.map((alarm) => ({ ...alarm, events: events.get(alarm.id) ?? [] })),
    scene,
  );
  const proofs = await lastProofs(holding, house.id);
  const channels = (await listChannels(holding, house.id)).map(({ id, label, provedAt, protection }) => ({
    ...{ label, protection, proof: proofs.get(id) ?? null },
    provedAt: provedAt === null ? null : Date.parse(provedAt),
  }));
  const today = toLocal(scene.now, house.zone).slice(0, 10);
  return { ...block, rows: [...provingRows(channels, today, scene), ...(block.rows ?? [])] };
}

/** The same of every house that is in use, in the order of the menus. */
export async function readReports(
  holding: Holding,
  ask: ReportAsk,
  preferences: Preferences,
  nowMs: number,
): Promise<Report[]> {
  const reports = [];
  for (const house of await listHouses(holding))
    reports.push(await readReport(holding, house, ask, preferences, nowMs));
  return reports;
}

async function sceneOf(
  holding: Holding,
  house: House,
  preferences: Preferences,
  now: number,
): Promise<Scene> {
  return { now, zone: house.zone, preferences, ...(await alarmNames(holding, house.id)) };
}

function isNight(name: string, zone: string): boolean {
  try {
    return nightNamed(name, zone).to > 0;
  } catch {
    return false;
  }
}
