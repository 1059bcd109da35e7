'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ConfirmDialog } from '@/components/ui/dialog';
import { TextArea, TextField } from '@/components/ui/field';
import { say } from '@/components/ui/toast';
import { retireWords } from '@/lib/wording/rule-retire';
import type { Keeping, KeepRuleProps } from './keeping';

/** Asks before a rule is renamed, its draft thrown away, or it is retired. */
export function KeepDialog({
  rule,
  house,
  retiring,
  onKeep,
  doing,
  onClose,
}: KeepRuleProps & { doing: Keeping; onClose: () => void }) {
  const router = useRouter();
  const [text, setText] = useState(doing === 'rename' ? rule.name : '');
  const [missing, setMissing] = useState<string | undefined>();
  const [failure, setFailure] = useState<string | undefined>();
  const [busy, setBusy] = useState(false);
  const isOnlyDraft = rule.versions.length === 1;
  const acts = {
    rename: {
      title: 'Rename this rule',
      description: 'Only what it is called changes: its versions and its address stay.',
      confirm: 'Rename',
      lacks: 'Give a name.',
      done: 'The rule is renamed.',
      leaves: false,
      run: () => onKeep('PATCH', '', { name: text.trim() }),
    },
    drop: {
      title: `Throw the draft of version ${rule.draft?.number ?? 1} away?`,
      description: isOnlyDraft
        ? 'It is the only version, so the rule is retired with it and can be brought back from the foot of the page Rules. No load is touched.'
        : rule.inForce === null
          ? 'It cannot be brought back. The versions before it stay. No load is touched.'
          : `It cannot be brought back. Version ${rule.inForce.number} stays in force as it is.`,
      confirm: 'Throw it away',
      lacks: null,
      done: 'The draft is thrown away.',
      leaves: isOnlyDraft,
      run: () => onKeep('DELETE', '/draft'),
    },
    retire: {
      title: `Retire ${rule.name}?`,
      description: `${retireWords(retiring)} Its versions stay, and it can be brought back.`,
      confirm: 'Retire it',
      lacks: 'Say why in a few words: it stays on record.',
      done: 'The rule is retired.',
      leaves: true,
      run: () => onKeep('POST', '/retire', { why: text.trim() }),
    },
  };
  const act = acts[doing];

  async function run() {
    if (act.lacks !== null && text.trim() === '') return setMissing(act.lacks);
    setBusy(true);
    const why = await act.run();
    setBusy(false);
    if (why !== null) return setFailure(why);
    say(act.done);
    onClose();
    if (act.leaves) router.push(`/${house}/rules`);
  }

  const field = { value: text, error: missing };
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={act.title}
      description={act.description}
      confirm={act.confirm}
      busy={busy}
      error={failure}
      onConfirm={() => void run()}
    >
      {doing === 'rename' ? (
        <TextField label="Name" {...field} onChange={(event) => setText(event.target.value)} />
      ) : doing === 'retire' ? (
        <TextArea label="Why" {...field} onChange={(event) => setText(event.target.value)} />
      ) : undefined}
    </ConfirmDialog>
  );
}
