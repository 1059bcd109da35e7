'use client';
import { Button } from '@/components/ui/button';
import { useWiringEditing } from './editing';

export function RegistersButton({ nodeId, nodeKey }: { nodeId: string; nodeKey: string }) {
  const { allowed, registers } = useWiringEditing();
  if (!allowed.includes('wiring.write')) return null;
  return (
    <Button kind="quiet" className="-ml-3" onClick={() => registers(nodeId)}>
      <span>
        What is read<span className="sr-only"> of {nodeKey}</span>…
      </span>
    </Button>
  );
}

export function TokenButtons({
  nodeId,
  nodeKey,
  isBoard,
  isRevoked,
}: {
  nodeId: string;
  nodeKey: string;
  /** On Modbus: it knows no token, and is reached or left alone. */
  isBoard: boolean;
  isRevoked: boolean;
}) {
  const { allowed, token } = useWiringEditing();
  if (!allowed.includes('node.token')) return null;
  const isRotated = !isBoard || isRevoked;
  const [made, ended] = isBoard ? ['Reach again', 'Leave alone'] : ['New token', 'Revoke'];
  return (
    <>
      {isRotated ? (
        <Button kind="quiet" onClick={() => token(nodeId, 'rotate')}>
          <span>
            {made}
            <span className="sr-only"> for {nodeKey}</span>…
          </span>
        </Button>
      ) : null}
      {isRevoked ? null : (
        <Button kind="quiet" onClick={() => token(nodeId, 'revoke')}>
          <span>
            {ended}
            <span className="sr-only"> {isBoard ? nodeKey : `the token of ${nodeKey}`}</span>…
          </span>
        </Button>
      )}
    </>
  );
}
