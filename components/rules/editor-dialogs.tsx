'use client';
import dynamic from 'next/dynamic';
import { useRouter } from 'next/navigation';
import type { RuleBody } from '@/lib/control/rule-body';
import type { RuleEditorData } from './editor-data';
import type { useLeaveWarning } from './use-leave-warning';
import type { RuleActions } from './use-rule-actions';

const ForceDialog = dynamic(() => import('./force-dialog').then((module) => module.ForceDialog));
const LeaveDialog = dynamic(() => import('./leave-dialog').then((module) => module.LeaveDialog));

/** What the editor asks before a draft comes into force, and before one leaves with something unsaved. */
export function EditorDialogs({
  data,
  body,
  draftNumber,
  isForcing,
  actions,
  leave,
  onForced,
  onThrowAway,
}: {
  data: RuleEditorData;
  body: RuleBody;
  draftNumber: number;
  isForcing: boolean;
  actions: Pick<RuleActions, 'force' | 'save'>;
  leave: ReturnType<typeof useLeaveWarning>;
  onForced: () => void;
  /** What was typed is given up. */
  onThrowAway: () => void;
}) {
  const { rule, names, preferences } = data;
  const router = useRouter();
  const to = leave.wanted;
  return (
    <>
      {isForcing ? (
        <ForceDialog
          {...{ body, names, preferences }}
          inForce={rule.inForce?.body ?? null}
          version={draftNumber}
          channelLabel={data.channel.label}
          isProved={data.channel.isProved}
          onForce={actions.force}
          onClose={onForced}
        />
      ) : null}
      {to === null ? null : (
        <LeaveDialog
          onStay={leave.stay}
          onLeave={() => {
            onThrowAway();
            router.push(to);
          }}
          onSave={async () => {
            const answer = await actions.save();
            if (answer.ok) router.push(to);
            return answer.ok ? null : answer.message;
          }}
        />
      )}
    </>
  );
}
