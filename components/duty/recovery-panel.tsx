import { Figures, Panel } from '@/components/ui/panel';
import type { EntryEffect, RecoveryTrend, RecoveryWeek } from '@/lib/analysis/recovery';
import type { Preferences } from '@/lib/units/preferences';
import { nightDate } from '@/lib/wording/duty';
import { effectName, effectWords, endsOf, trendWords, weekRows } from '@/lib/wording/duty-recovery';
import { RecoveryCurves } from './recovery-curves';
import type { RestCurve } from './recovery-group';

export interface RecoveryData {
  weeks: RecoveryWeek[];
  trend: RecoveryTrend;
  effects: EntryEffect[];
  /** Some rests of the first and of the last week that has a figure. */
  first: RestCurve[];
  last: RestCurve[];
}

/** How the heap comes back after a draw: rests with their fit, the weeks' figures, and what was done to it. */
export function RecoveryPanel({
  recovery,
  zone,
  preferences,
}: {
  recovery: RecoveryData;
  zone: string;
  preferences: Preferences;
}) {
  const ends = endsOf(recovery.weeks);
  const title = 'How it comes back after a draw';
  if (ends === null)
    return (
      <Panel title={title}>
        <p className="text-soft">
          Not known yet: no rest was long enough, or it is not read beside the pipe.
        </p>
      </Panel>
    );
  const { first, last } = ends;
  const isOne = first.week === last.week;
  return (
    <Panel title={title}>
      <p className="text-[0.9rem] text-soft">Each line is one rest; beside the pipe</p>
      <RecoveryCurves
        preferences={preferences}
        groups={[
          ...(isOne
            ? []
            : [{ name: `week of ${nightDate(first.week)}`, tone: 'base' as const, rests: recovery.first }]),
          { name: `week of ${nightDate(last.week)}`, tone: 'core' as const, rests: recovery.last },
        ]}
      />
      <Figures rows={[...(isOne ? [] : weekRows(first, preferences)), ...weekRows(last, preferences)]} />
      <p className="pt-1 text-[0.9rem]">{trendWords(recovery.trend)}</p>
      {recovery.effects.length === 0 ? null : (
        <details className="text-[0.9rem]">
          <summary className="flex min-h-11 cursor-pointer items-center text-soft hover:text-ink">
            Before and after what was done to it
          </summary>
          <ul className="border-t border-line">
            {recovery.effects.map((effect) => (
              <li key={`${effect.at} ${effect.kind}`} className="border-b border-faint py-1.5">
                <span className="font-semibold">{effectName(effect, zone)}</span>{' '}
                {effectWords(effect, preferences)}
              </li>
            ))}
          </ul>
        </details>
      )}
    </Panel>
  );
}
