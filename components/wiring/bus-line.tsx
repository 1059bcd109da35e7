import type { FieldNode } from '@/lib/schema/yard-view';
import { boardWords, linkWords } from '@/lib/wording/bus';
import { RegistersButton } from './node-buttons';

/** How a node on a bus is reached, and why it is not. Nothing for one that calls by itself. */
export function BusLine({ node, trouble }: { node: FieldNode; trouble: string | null }) {
  if (node.kind !== 'modbus' && node.kind !== 'mqtt') return null;
  return (
    <span className="mt-1 block text-[0.85rem] font-normal text-soft">
      {node.kind === 'modbus' ? <Board node={node} /> : <Broker node={node} />}
      {trouble === null ? null : (
        <span className="block font-semibold wrap-anywhere text-warn">{linkWords(node.kind, trouble)}</span>
      )}
    </span>
  );
}

function Board({ node }: { node: FieldNode }) {
  const { modbus, registers } = node;
  if (modbus === null) return <span className="block text-warn">How it is reached is not told yet.</span>;
  return (
    <>
      <span className="block wrap-anywhere">
        {modbus.host}:{modbus.port}, unit {modbus.unit}; {registers.length === 0 ? 'no' : registers.length}{' '}
        {registers.length === 1 ? 'value' : 'values'} read
      </span>
      <span className={modbus.watchdog === null ? 'block text-warn' : 'block'}>
        {boardWords(modbus.watchdog?.within ?? null)}
      </span>
      <RegistersButton nodeId={node.id} nodeKey={node.key} />
    </>
  );
}

function Broker({ node }: { node: FieldNode }) {
  const { mqtt, id } = node;
  if (mqtt === null)
    return <span className="block text-warn">How its broker is reached is not told yet.</span>;
  return (
    <>
      <span className="block wrap-anywhere">
        {mqtt.host}:{mqtt.port}
        {mqtt.tls ? ' by TLS' : ', without TLS'}
      </span>
      <span className="block font-mono wrap-anywhere">middenward/v1/{id}/up and …/down</span>
    </>
  );
}
