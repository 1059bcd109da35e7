import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import { WiringEditing } from '@/components/wiring/editing';
import type { Yard } from '@/components/wiring/forms/options';
import { nextStep, setupSteps, type SetupFacts } from '@/lib/analysis/setup';
import type { Preferences } from '@/lib/units/preferences';
import { setupSentence } from '@/lib/wording/setup';
import { MAINS_CAUTION } from '@/lib/wording/wiring-parts';
import { Step } from './step';

export interface SetupData extends Yard {
  facts: SetupFacts;
}

/** A house from nothing, step by step: each step is told from what there is, and opens the forms that Wiring has. */
export function SetupView({
  data,
  allowed,
  preferences,
}: {
  data: SetupData;
  allowed: readonly string[];
  preferences: Preferences;
}) {
  const { facts, ...given } = data;
  const { house, nodes, points, sources, channels, loops, interlocks, lockouts } = given;
  const yard: Yard = { house, nodes, points, sources, channels, loops, interlocks, lockouts };
  const steps = setupSteps(facts);
  const next = nextStep(steps);
  return (
    <WiringEditing {...{ yard, preferences, allowed }}>
      <div className="flex flex-col gap-5">
        <Sentence before={`Set-up of ${house.name}`} phrases={setupSentence(steps)} />
        {allowed.includes('yard.write') ? null : (
          <Notice tone="quiet" title="You can read the set-up, not change it.">
            An installer or an owner wires a house. You write its rules.
          </Notice>
        )}
        <ol className="flex flex-col gap-3">
          {steps.map((one, place) => (
            <Step
              key={one.step}
              step={one}
              number={place + 1}
              isNext={one === next}
              {...{ facts, yard, allowed, preferences }}
            />
          ))}
        </ol>
        <Notice tone="warn" title="Mains in a damp house">
          {MAINS_CAUTION}
        </Notice>
        <ButtonLink href={`/${house.slug}/wiring`} className="self-start">
          All of its wiring
        </ButtonLink>
      </div>
    </WiringEditing>
  );
}
