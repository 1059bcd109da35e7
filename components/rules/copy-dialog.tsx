'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Select, TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { pointsOfRule } from '@/lib/schema/rule-points';
import { ChannelSelect } from './channel-select';
import { CopyPoints } from './copy-points';
import { DraftDialog } from './draft-dialog';
import type { KeepRuleProps } from './keeping';
import { suggestPoint } from './suggest-points';
import { useTarget } from './use-target';

/** Asks for the channel and, point by point, what stands there for what the rule names here. A draft comes of it. */
export function CopyDialog({ rule, house, points, onClose }: KeepRuleProps & { onClose: () => void }) {
  const router = useRouter();
  const [to, setTo] = useState({ house, channel: '', name: rule.name });
  const [number, setNumber] = useState(
    rule.draft?.number ?? rule.inForce?.number ?? rule.versions[0]?.number ?? 1,
  );
  const [chosen, setChosen] = useState<Record<string, string>>({});
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [busy, setBusy] = useState(false);
  const { houses, target, isLost } = useTarget(to.house);
  const body = rule.versions.find((version) => version.number === number)?.body ?? rule.body;
  const used = pointsOfRule(body).map((key) => {
    const point = points.find((one) => one.key === key);
    const here = to.house === house ? key : null;
    const there = chosen[key] ?? here ?? suggestPoint(point, target?.points ?? []) ?? '';
    return { key, point, there };
  });

  async function copy() {
    const missing = {
      ...(to.channel === '' ? { channel: 'Choose the channel that it shall run.' } : {}),
      ...(to.name.trim() === '' ? { name: 'Give a name.' } : {}),
      ...Object.fromEntries(
        used.flatMap(({ there }, place) =>
          there === '' ? [[`points.${place}.to`, 'Choose the point that stands for it there.']] : [],
        ),
      ),
    };
    setErrors(missing);
    if (Object.keys(missing).length > 0) return;
    setBusy(true);
    const answer = await send<{ slug: string; house: string }>('POST', `/rules/${rule.id}/copy`, {
      ...to,
      version: number,
      points: used.map(({ key, there }) => ({ from: key, to: there })),
    });
    setBusy(false);
    if (!answer.ok)
      return setErrors(Object.keys(answer.fields).length > 0 ? answer.fields : { all: answer.message });
    say('The copy is written as a draft. Nothing runs by it until you put it into force.');
    router.push(`/${answer.value.house}/rules/${answer.value.slug}`);
    onClose();
  }

  return (
    <DraftDialog
      title={`Copy ${rule.name}`}
      description="A new rule comes of it, as a draft: nothing moves until you put it into force. Later changes of this rule do not reach the copy."
      write="Write the copy"
      disabled={target === null}
      failure={
        errors.all ??
        errors.version ??
        (isLost ? 'The server does not answer. Close this and try again.' : null)
      }
      onWrite={() => void copy()}
      {...{ busy, onClose }}
    >
      <Select
        label="House"
        value={to.house}
        error={errors.house}
        onChange={(event) => {
          setTo({ ...to, house: event.target.value, channel: '' });
          setChosen({});
          setErrors({});
        }}
      >
        {houses.length === 0 ? <option value={house}>This house</option> : null}
        {houses.map((one) => (
          <option key={one.id} value={one.slug}>
            {one.name}
          </option>
        ))}
      </Select>
      <ChannelSelect
        label="Runs there"
        value={to.channel}
        error={errors.channel}
        channels={target?.channels ?? []}
        onChoose={(channel) => setTo({ ...to, channel })}
      />
      <TextField
        label="Name"
        value={to.name}
        error={errors.name}
        onChange={(event) => setTo({ ...to, name: event.target.value })}
      />
      {rule.versions.length === 1 ? null : (
        <Select label="Version" value={number} onChange={(event) => setNumber(Number(event.target.value))}>
          {rule.versions.map((version) => (
            <option key={version.id} value={version.number}>
              {version.number} · {version.status === 'in-force' ? 'in force' : version.status}
            </option>
          ))}
        </Select>
      )}
      <CopyPoints
        {...{ used, errors }}
        there={target?.points ?? []}
        onChoose={(key, there) => setChosen({ ...chosen, [key]: there })}
      />
    </DraftDialog>
  );
}
