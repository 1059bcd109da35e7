/** From one step's result to the rows that the database keeps of it. Pure. */
import { v7 } from 'uuid';
import type { HouseHead, ChannelWiring } from '@/db/queries/plan';
import type { DecisionRow, RelayReportRow, SwitchingRow } from '@/db/queries/running';
import type { ControlEvent, Explanation } from '@/lib/control/events';
import type { Data, State } from '@/lib/control/types';
import type { AloneChange } from './node-fallback';
import { loadState, type Report, type Trip } from './node-relays';

export function switchingRows(
  house: HouseHead,
  events: readonly ControlEvent[],
  numberOf: (channelId: string) => number | null,
): SwitchingRow[] {
  return events.flatMap((event) => {
    if (event.kind !== 'switching') return [];
    const { channel, from, to, claim, explanation } = event;
    // One that a later switching of the same step overtook is carried by no command.
    const number = event.overtaken === true ? null : numberOf(channel);
    return [
      {
        ...headOf(house, channel, event.at),
        from,
        to,
        claim,
        number,
        ...ruleOf(explanation),
        explanation: { ...explanation },
      },
    ];
  });
}

export function decisionRows(house: HouseHead, events: readonly ControlEvent[]): DecisionRow[] {
  return events.flatMap((event) => {
    if (event.kind !== 'switching' && event.kind !== 'decision') return [];
    const head = headOf(house, event.channel, event.at);
    // a switching has a row of its own that carries its ladder
    if (event.kind === 'switching') return [{ ...head, state: event.to, claim: event.claim }];
    const { state, claim, explanation } = event;
    // one that was overtaken within its own instant never had a ladder
    const isTold = explanation.ladder.length > 0;
    return [{ ...head, state, claim, explanation: isTold ? { ...explanation } : null }];
  });
}

export function reportRows(
  house: HouseHead,
  changed: readonly ChannelWiring[],
  report: Report,
): RelayReportRow[] {
  return changed.flatMap((channel) => {
    const coil = report.channels[String(channel.relay)];
    if (coil === undefined) return [];
    return {
      holdingId: house.holdingId,
      id: v7(),
      channelId: channel.id,
      at: new Date(report.at),
      state: loadState(channel, coil),
      number: report.number,
    };
  });
}

/** Coils that dropped with their lease: switchings of their own, that no command made. */
export function tripRows(
  house: HouseHead,
  { trip, dropped }: Trip,
  at: number,
  lease: { renewedAt: number | null; toldAt: number },
): SwitchingRow[] {
  return dropped.map((channel) => uncommanded(house, channel, 'off', at, trip, { lease }));
}

/** What a node's fallback did: switchings of their own too, each told once by its time. */
export function aloneRows(house: HouseHead, changes: readonly AloneChange[]): SwitchingRow[] {
  return changes.map(({ channel, at, coil, told }) => {
    const { below, above } = channel.fallback ?? { below: null, above: null };
    const point = told?.point ?? channel.fallback?.point ?? null;
    const state = loadState(channel, coil);
    const fallback = { state, point, value: told?.value ?? null, why: told?.why ?? null, below, above };
    return uncommanded(house, channel, coil, at, `fallback/${told?.at ?? at}/${coil}`, { fallback });
  });
}

function uncommanded(
  house: HouseHead,
  channel: ChannelWiring,
  coil: State,
  at: number,
  trip: string,
  more: Data,
): SwitchingRow {
  const to = loadState(channel, coil);
  const because = { safe: loadState(channel, 'off'), points: [], trip, ...more };
  const explanation: Explanation = {
    channel: channel.id,
    at,
    state: to,
    claim: 'fail-safe',
    until: null,
    ladder: [{ claim: 'fail-safe', speaks: true, wants: to, because }],
    next: [],
    rule: null,
  };
  const from = to === 'on' ? 'off' : 'on';
  return { ...headOf(house, channel.id, at), from, to, claim: 'fail-safe', number: null, trip, explanation };
}

function headOf(house: HouseHead, channelId: string, at: number) {
  return { holdingId: house.holdingId, houseId: house.id, id: v7(), channelId, at: new Date(at) };
}

function ruleOf({ rule }: Explanation) {
  return rule === null ? {} : { ruleId: rule.id, version: rule.version };
}
