'use client';
import { useEffect } from 'react';
import { useController } from 'react-hook-form';
import { useRuleForm } from '../context';
import { BuilderActsProvider } from './builder-context';
import { GroupBox } from './group-box';
import { useBuilder } from './use-builder';

/**
 * Edits a rule's conditions: groups in groups, each condition with how it stands at this moment. Loaded when somebody
 * wants to change them, since most visits only read.
 */
export function ConditionBuilder({ isFirst }: { isFirst: boolean }) {
  const { control } = useRuleForm();
  const { field } = useController({ control, name: 'only' });
  const { acts, said } = useBuilder(field.value, field.onChange);
  const { addFact, root } = acts;
  // whoever pressed "Add a condition" wants one, not another button
  useEffect(() => {
    if (isFirst && root.nodes.length === 0) addFact(root.id);
    // only when it opens: a list that was emptied by hand stays empty
  }, []);
  return (
    <BuilderActsProvider value={acts}>
      <GroupBox group={root} path="only" number="" />
      <p role="status" className="sr-only">
        {said}
      </p>
    </BuilderActsProvider>
  );
}
