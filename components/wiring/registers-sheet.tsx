'use client';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { REGISTERS_MOST } from '@/lib/schema/bus';
import type { Preferences } from '@/lib/units/preferences';
import type { Yard } from './forms/options';
import { RegisterFields } from './register-fields';
import { RegistersFoot } from './registers-foot';
import { bodyOfRow, bodyOfRows, rowAfter, rowsOf, type RegisterRow } from './register-rows';
import { readNow } from './test-reading';

const UNITS = ['Cel', 'Far', '%RH', '/', 'ppm', 'Pa', 'hPa', 'W', 'kW', 'V', 'A', 'mA', 'm/s', 'l/s', 'W/m2'];

/** What is read of a board, a row a value. What was typed stays until it is saved or thrown away. */
export function RegistersSheet({
  yard,
  preferences,
  nodeId,
  onClose,
}: {
  yard: Yard;
  preferences: Preferences;
  nodeId: string;
  onClose: () => void;
}) {
  const router = useRouter();
  const list = useId();
  // what the form began with; the page behind it may be read anew meanwhile
  const [node] = useState(() => yard.nodes.find((one) => one.id === nodeId));
  const [rows, setRows] = useState(() => rowsOf(node?.registers ?? []));
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState('');
  const [isBusy, setBusy] = useState(false);
  const [isLeaving, setLeaving] = useState(false);
  if (node === undefined) return null;
  const isDirty = JSON.stringify(rows) !== JSON.stringify(rowsOf(node.registers));
  const house = yard.house.slug;

  function put(next: RegisterRow[]) {
    setRows(next);
    setErrors({});
    setFailure('');
  }
  async function save() {
    const { body, errors: unread } = bodyOfRows(rows, preferences);
    setErrors(unread);
    if (Object.keys(unread).length > 0) return setFailure('Some fields need another look.');
    setBusy(true);
    const path = `/houses/${house}/nodes/${nodeId}`;
    const answer = await send('PATCH', path, { registers: body }, `"${node?.revision}"`);
    setBusy(false);
    if (answer.ok) {
      router.refresh();
      say('Saved.');
      return onClose();
    }
    setErrors(answer.fields);
    setFailure(answer.message);
  }
  async function read(row: RegisterRow) {
    const { body, errors: unread } = bodyOfRow(row, preferences);
    const [first] = Object.values(unread);
    return first ?? readNow(house, nodeId, body);
  }

  return (
    <Dialog
      open
      as="sheet"
      title={`What is read of ${node.key}`}
      description="Each value becomes readings of a point. The value is the raw number times one figure, plus another."
      onOpenChange={(open) => {
        if (open) return;
        if (isDirty) setLeaving(true);
        else onClose();
      }}
    >
      <datalist id={list}>
        {yard.points
          .filter((point) => point.node === node.key)
          .map((point) => (
            <option key={point.key} value={point.key}>
              {point.name}
            </option>
          ))}
      </datalist>
      <datalist id={`${list}-units`}>
        {UNITS.map((unit) => (
          <option key={unit} value={unit} />
        ))}
      </datalist>
      <div className="mt-3 flex flex-col gap-4">
        {rows.length === 0 ? <p>Nothing is read of this board yet.</p> : null}
        {rows.map((row, place) => (
          <RegisterFields
            key={row.id}
            {...{ row, place, errors, read }}
            points={list}
            change={(next) => put(rows.map((one) => (one.id === row.id ? next : one)))}
            remove={() => put(rows.filter((one) => one.id !== row.id))}
          />
        ))}
        {rows.length >= REGISTERS_MOST ? null : (
          <Button onClick={() => put([...rows, rowAfter(rows)])}>Add a value</Button>
        )}
        <p role="alert" className="font-semibold text-alarm empty:hidden">
          {failure}
        </p>
        <RegistersFoot
          {...{ isLeaving, isBusy, setLeaving, onClose }}
          save={() => void save()}
          leave={() => (isDirty ? setLeaving(true) : onClose())}
        />
      </div>
    </Dialog>
  );
}
