/** What people did in the past that is played: orders, acknowledgements and rules, by the queries that routes use. */
import { addPersonCommand } from '@/db/queries/person-command';
import { loadHouse } from '@/db/queries/plan';
import { findRule } from '@/db/queries/rule';
import { forceDraft, writeDraft } from '@/db/queries/rule-version';
import { commandsAfter } from '@/db/queries/waiting-command';
import { readyBy, type PersonDeed } from '@/db/seed/winter';
import { RuleBody } from '@/lib/schema/rule';
import type { Kept } from './kept';
import type { Place } from './place';

/** The heaps were warm when the controller was put in: somebody says so, or they would have to prove it for days. */
export async function sayReady({ run, holding, record }: Place, from: number): Promise<void> {
  const by = readyBy[record.slug] ?? record.slug;
  for (const source of record.config.sources.filter((one) => one.kind === 'heap' && one.ready !== null)) {
    const order = { at: new Date(from), by, body: { kind: 'ready', source: source.slug } } as const;
    await addPersonCommand(holding, record.id, order);
  }
  run.order(await commandsAfter(holding, record.id, run.taken), from);
}

export async function actPerson(
  { run, holding, record }: Place,
  kept: Kept,
  deed: PersonDeed,
  at: number,
): Promise<void> {
  const act = { by: deed.by, now: new Date(at) };
  if (deed.does === 'acknowledge') {
    const { by, note } = deed;
    kept.alarms.push({ holdingId: holding.id, houseId: record.id, does: 'acknowledge', at, by, note });
  } else if (deed.does === 'force') {
    const rule = await findRule(holding, deed.rule);
    if (rule === null) throw new Error(`The demo has no rule ${deed.rule}.`);
    const drafted = await writeDraft(holding, rule, RuleBody.parse(deed.body), act);
    // the demo's rules drive channels that were proved in the autumn
    await forceDraft(holding, drafted, deed.why, act, null);
    const changedRecord = await loadHouse(holding, record.id);
    if (changedRecord !== null) run.replan(changedRecord, at);
  } else {
    const { channel } = deed;
    const body =
      deed.does === 'auto'
        ? ({ kind: 'auto', channel } as const)
        : ({
            kind: 'hand',
            channel,
            state: deed.state,
            seconds: deed.seconds,
            holdInFrost: false,
          } as const);
    await addPersonCommand(holding, record.id, { at: act.now, by: act.by, body });
    run.order(await commandsAfter(holding, record.id, run.taken), at);
  }
}
