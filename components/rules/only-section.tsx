'use client';
import dynamic from 'next/dynamic';
import { useState, type ReactNode } from 'react';
import { useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { useFacts, useRuleForm } from './context';
import { Section } from './section';

const ConditionBuilder = dynamic(() =>
  import('./conditions/builder').then((module) => module.ConditionBuilder),
);

/** Extra conditions, each with how it stands now; to be read at first, and built anew after a press. */
export function OnlySection({
  reading,
  isBuilding,
  onBuild,
}: {
  /** The conditions as they are saved. */
  reading: ReactNode;
  isBuilding: boolean;
  onBuild: () => void;
}) {
  const form = useRuleForm();
  const { mayWrite } = useFacts();
  const root = useWatch({ control: form.control, name: 'only' });
  const [wasEmpty] = useState(root.nodes.length === 0);
  const isEmpty = root.nodes.length === 0;
  return (
    <Section title="Only while">
      {isEmpty && !isBuilding ? (
        <p className="text-[0.9rem] text-soft">No condition: the band alone decides.</p>
      ) : null}
      {isBuilding ? (
        <ConditionBuilder isFirst={wasEmpty} />
      ) : (
        <>
          {isEmpty ? null : reading}
          {mayWrite ? (
            <Button kind="quiet" className="-ml-4 self-start" data-field="only" onClick={onBuild}>
              {isEmpty ? 'Add a condition' : 'Change the conditions'}
            </Button>
          ) : null}
        </>
      )}
    </Section>
  );
}
