/** A settled run as the worker, the pages and a trial are told of it. */
import { restTimes } from './claims/rest';
import { isReady, isUnderFloor } from './claims/source-guard';
import { creditAt } from './credit';
import { usedMs } from './day';
import { becauseOf } from './ladder';
import { timeOf, valueOf } from './readings';
import { entry, told, type Run } from './run';
import type { ChannelResult, PointResult, SourceResult } from './step-result';

export function channelResult(run: Run, index: number): ChannelResult {
  const { id, number, safe } = entry(run.plan.channels, index);
  const memory = entry(run.channels, index);
  const claim = memory.claim ?? 'idle';
  const because = told(run, () => becauseOf(run, index, claim));
  return {
    id,
    number,
    state: memory.wanted,
    coil: (memory.wanted === 'on') === (safe === 'off') ? 'on' : 'off',
    claim,
    because,
    until: typeof because.until === 'number' ? because.until : null,
    mode: memory.lockouts.length > 0 ? 'locked' : memory.hand !== null ? 'hand' : 'auto',
    counted: memory.counted,
  };
}

export function pointResult(run: Run, index: number): PointResult {
  const { id, quality, why, doubts } = entry(run.points, index);
  const [value, at] = [valueOf(run, index), timeOf(run, index)];
  return { id, value, at, quality, why, doubtSince: doubts?.since ?? null, lastDoubt: doubts?.last ?? null };
}

export function sourceResult(run: Run, index: number): SourceResult {
  const { id, slug, config } = entry(run.plan.sources, index);
  const memory = entry(run.sources, index);
  const rest = memory.resting ? told(run, () => restTimes(run, index)) : null;
  return {
    id,
    slug,
    credit: creditAt(memory, run.at),
    restSince: rest?.restSince ?? null,
    restUntil: rest?.restUntil ?? null,
    restAtMostUntil: rest?.restAtMostUntil ?? null,
    drawnTodayS: usedMs(memory, run.at) / 1000,
    drawing: memory.draws > 0,
    ready: config.ready === null ? null : isReady(run, index),
    underFloor: isUnderFloor(run, index),
  };
}
