/** Fail-safe: the channel has rules in season, and none of them has a point or stand-in that is not bad. */
import type { FailSafeReason } from '../because';
import { lastTimeOf } from '../readings';
import { entry } from '../run';
import type { ClaimRung } from './claim';
import { hasUsablePoint } from './hand';

export const failSafe: ClaimRung<'fail-safe'> = {
  claim: 'fail-safe',
  speaks: (run, channel) => {
    const { rules, safe } = entry(run.plan.channels, channel);
    let inSeason = false;
    for (const rule of rules) {
      if (run.calendars[rule]?.inSeason !== true) continue;
      if (hasUsablePoint(run, rule)) return null;
      inSeason = true;
    }
    return inSeason ? safe : null;
  },
  because: (run, channel): FailSafeReason => {
    const { rules, safe } = entry(run.plan.channels, channel);
    const named = new Map<string, FailSafeReason['points'][number]>();
    for (const rule of rules) {
      if (run.calendars[rule]?.inSeason !== true) continue;
      for (const { point, key } of entry(run.plan.rules, rule).points) {
        const memory = point === null ? null : entry(run.points, point);
        named.set(key, {
          point: key,
          why: memory === null ? 'no-such-point' : memory.why,
          lastAt: point === null ? null : lastTimeOf(run, point),
        });
      }
    }
    return { safe, points: [...named.values()] };
  },
};
