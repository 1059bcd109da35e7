import { NewRule } from '@/components/rules/new-rule';
import { ButtonLink } from '@/components/ui/button';
import { AddButton, ChangeButton } from '@/components/wiring/editing';
import type { Yard } from '@/components/wiring/forms/options';
import type { SetupFacts, SetupStepName } from '@/lib/analysis/setup';
import type { Preferences } from '@/lib/units/preferences';
import { firstChannel, firstLoop, firstSource, usualPoints } from './beginnings';

interface Acts {
  step: SetupStepName;
  isNext: boolean;
  facts: SetupFacts;
  yard: Yard;
  allowed: readonly string[];
  preferences: Preferences;
}

/** What can be pressed in a step: forms that begin with what is known already, and links where a page does it. */
export function StepActs({ step, isNext, facts, yard, allowed, preferences }: Acts) {
  const { house, nodes, points, sources, channels } = yard;
  switch (step) {
    case 'house':
      return <ChangeButton kind="house" id={house.id} of={house.name} />;
    case 'node':
      return (
        <AddButton
          kind="node"
          label={nodes.length === 0 ? 'Register a node…' : 'Register another node…'}
          primary={isNext}
        />
      );
    case 'point':
      return (
        <>
          {usualPoints(yard).map(({ label, first }, place) => (
            <AddButton
              key={label}
              kind="point"
              label={`${label}…`}
              primary={isNext && place === 0}
              first={first}
            />
          ))}
          <AddButton kind="point" label="Another point…" />
        </>
      );
    case 'source':
      return <AddButton kind="source" label="Add a source…" primary={isNext} first={firstSource(yard)} />;
    case 'channel':
      return <AddButton kind="channel" label="Add a channel…" primary={isNext} first={firstChannel(yard)} />;
    case 'loop':
      return <AddButton kind="loop" label="Add a loop…" primary={isNext} first={firstLoop(yard)} />;
    case 'rule':
      if (facts.drafts + facts.rulesInForce > 0)
        return <ButtonLink href={`/${house.slug}/rules`}>Its rules</ButtonLink>;
      return allowed.includes('rule.write') ? (
        <NewRule house={house.slug} {...{ channels, points, sources, preferences }} />
      ) : (
        <p className="text-soft">A grower or an owner writes it and puts it into force.</p>
      );
    case 'proving':
      return channels
        .filter((one) => one.provedAt === null)
        .map((one) => (
          <ButtonLink key={one.key} prefetch={false} href={`/${house.slug}/wiring/prove/${one.key}`}>
            Prove the {one.label}
          </ButtonLink>
        ));
    case 'sheet':
      return <ButtonLink href={`/${house.slug}/wiring/sheet`}>Look at the sheet, and print it</ButtonLink>;
  }
}
