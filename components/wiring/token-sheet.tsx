'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { Yard } from './forms/options';
import { TokenShown } from './token-shown';

/** A new token for a node, or the end of all it has. */
export function TokenSheet({
  yard,
  nodeId,
  doing,
  onClose,
}: {
  yard: Yard;
  nodeId: string;
  doing: 'rotate' | 'revoke';
  onClose: () => void;
}) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string>();
  const [token, setToken] = useState<string | null>(null);
  const [node] = useState(() => yard.nodes.find((one) => one.id === nodeId));
  if (node === undefined) return null;
  const path = `/houses/${yard.house.slug}/nodes/${node.id}/token`;

  async function confirm() {
    setBusy(true);
    const answer = await send<{ token?: string }>(doing === 'rotate' ? 'POST' : 'DELETE', path);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    router.refresh();
    if (doing === 'rotate' && typeof answer.value.token === 'string') return setToken(answer.value.token);
    say('The token is revoked.');
    onClose();
  }

  if (token !== null) {
    const note =
      node.revokedAt === null
        ? 'The token before stays good for 24 h, so that the node need not fall silent meanwhile.'
        : undefined;
    return (
      <TokenShown
        nodeKey={node.key}
        kind={node.kind}
        token={token}
        {...(note === undefined ? {} : { note })}
        onClose={onClose}
      />
    );
  }
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={doing === 'rotate' ? `New token for ${node.key}?` : `Revoke the token of ${node.key}?`}
      description={
        doing === 'rotate'
          ? 'The new token is shown once. The one in use stays good for 24 h more.'
          : 'The node is cut off at once. Within 30 s its relays fall to their safe states, and nothing of it is measured until it has a new token.'
      }
      confirm={doing === 'rotate' ? 'Make a new token' : 'Revoke it'}
      kind={doing === 'rotate' ? 'primary' : 'alarm'}
      busy={busy}
      error={failure}
      onConfirm={() => void confirm()}
    />
  );
}
