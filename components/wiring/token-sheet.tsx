'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { Yard } from './forms/options';
import { TokenShown } from './token-shown';

/** A board on Modbus knows no token: it is reached from here, or left alone. */
const BOARD = {
  rotate: {
    title: (key: string) => `Reach ${key} again?`,
    description: 'The board is connected to and commanded from now on.',
    confirm: 'Reach it again',
    said: 'The board is being reached.',
  },
  revoke: {
    title: (key: string) => `Leave ${key} alone?`,
    description:
      'Its coils are let go, as far as it can be reached, and the connection is closed. Nothing of it is measured or commanded until it is reached again.',
    confirm: 'Leave it alone',
    said: 'The board is left alone.',
  },
};
const NODE = {
  rotate: {
    title: (key: string) => `New token for ${key}?`,
    description: 'The new token is shown once. The one in use stays good for 24 h more.',
    confirm: 'Make a new token',
    said: 'A new token is made.',
  },
  revoke: {
    title: (key: string) => `Revoke the token of ${key}?`,
    description:
      'The node is cut off at once. Within 30 s its relays fall to their safe states, and nothing of it is measured until it has a new token.',
    confirm: 'Revoke it',
    said: 'The token is revoked.',
  },
};

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
  const isBoard = node.kind === 'modbus';
  const words = (isBoard ? BOARD : NODE)[doing];
  const path = `/houses/${yard.house.slug}/nodes/${node.id}/token`;

  async function confirm() {
    setBusy(true);
    const answer = await send<{ token?: string }>(doing === 'rotate' ? 'POST' : 'DELETE', path);
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    router.refresh();
    if (doing === 'rotate' && !isBoard && typeof answer.value.token === 'string')
      return setToken(answer.value.token);
    say(words.said);
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
      title={words.title(node.key)}
      description={words.description}
      confirm={words.confirm}
      kind={doing === 'rotate' ? 'primary' : 'alarm'}
      busy={busy}
      error={failure}
      onConfirm={() => void confirm()}
    />
  );
}
