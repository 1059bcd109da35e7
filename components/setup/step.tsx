import { classes } from '@/components/ui/classes';
import type { Yard } from '@/components/wiring/forms/options';
import type { SetupFacts, SetupStep } from '@/lib/analysis/setup';
import type { Preferences } from '@/lib/units/preferences';
import { STEP_TITLES, STEP_WHY, stepSays } from '@/lib/wording/setup';
import { PutOffButton } from './put-off-button';
import { StepActs } from './step-acts';

const STATES = { done: 'done', open: 'to do', 'put-off': 'put off', waits: 'waits' } as const;

/** One step: its number and state in words, what is there, what to press, and putting it off. */
export function Step({
  step,
  number,
  isNext,
  facts,
  yard,
  allowed,
  preferences,
}: {
  step: SetupStep;
  number: number;
  isNext: boolean;
  facts: SetupFacts;
  yard: Yard;
  allowed: readonly string[];
  preferences: Preferences;
}) {
  const { state } = step;
  const title = `step-${step.step}`;
  return (
    <li
      data-step={step.step}
      data-state={state}
      aria-current={isNext ? 'step' : undefined}
      className={classes(
        'rounded-lg border bg-sheet p-4',
        isNext ? 'border-2 border-ink' : 'border-line',
        state === 'waits' && 'border-dashed',
      )}
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 id={title} className="font-semibold">
          <span className="mr-2 font-mono text-soft">{number}</span>
          {STEP_TITLES[step.step]}
        </h2>
        <p className={classes('text-[0.9rem]', state === 'done' ? 'font-semibold text-house' : 'text-soft')}>
          {STATES[state]}
        </p>
      </div>
      <p className="mt-1">{stepSays(step, facts)}</p>
      {isNext || state === 'open' ? (
        <p className="mt-1 text-[0.95rem] text-soft">{STEP_WHY[step.step]}</p>
      ) : null}
      <div className="mt-3 flex flex-wrap items-center gap-2 empty:hidden">
        {state === 'waits' ? null : (
          <StepActs step={step.step} isNext={isNext} {...{ facts, yard, allowed, preferences }} />
        )}
        {allowed.includes('yard.write') ? (
          <PutOffButton house={yard.house.slug} putOff={facts.putOff} {...{ step: step.step, state }} />
        ) : null}
      </div>
    </li>
  );
}
