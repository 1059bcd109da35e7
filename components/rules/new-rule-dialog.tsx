'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Select, TextField } from '@/components/ui/field';
import { Phrases } from '@/components/ui/sentence';
import { send } from '@/components/ui/send';
import { RuleBody } from '@/lib/schema/rule';
import type { Channel, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { ruleSentence } from '@/lib/wording/rule';
import { midSentence, pointWords } from '@/lib/wording/rule-names';
import { ChannelSelect } from './channel-select';
import { DraftDialog } from './draft-dialog';
import { firstBody } from './first-body';

export interface NewRuleProps {
  house: string;
  channels: Channel[];
  points: Point[];
  sources: Source[];
  preferences: Preferences;
}

/** Asks for the channel and the point; everything else has a careful beginning in the draft. */
export function NewRuleDialog({
  house,
  channels,
  points,
  sources,
  preferences,
  onClose,
}: NewRuleProps & { onClose: () => void }) {
  const router = useRouter();
  const [channelKey, setChannel] = useState('');
  const [pointKey, setPoint] = useState('');
  const [typedName, setName] = useState<string | null>(null);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [busy, setBusy] = useState(false);
  const channel = channels.find((one) => one.key === channelKey);
  const names = { channel: { label: channel?.label ?? '', loadKind: channel?.load.kind ?? 'other' }, points };
  const name =
    typedName ??
    (channel && pointKey !== '' ? `${channel.label} by ${midSentence(pointWords(pointKey, names))}` : '');
  const body =
    channel === undefined || pointKey === ''
      ? null
      : firstBody(
          channel,
          sources.find((one) => one.slug === channel.source),
          pointKey,
        );

  async function create() {
    if (channel === undefined || body === null || name.trim() === '') {
      return setErrors({
        ...(channel === undefined ? { channel: 'Choose the channel that it runs.' } : {}),
        ...(pointKey === '' ? { 'body.point': 'Choose the point that it goes by.' } : {}),
        ...(name.trim() === '' && channel !== undefined && pointKey !== '' ? { name: 'Give a name.' } : {}),
      });
    }
    setBusy(true);
    const answer = await send<{ slug: string }>('POST', `/houses/${house}/rules`, {
      name,
      channel: channel.key,
      body,
    });
    if (answer.ok) return router.push(`/${house}/rules/${answer.value.slug}`);
    setBusy(false);
    setErrors(Object.keys(answer.fields).length > 0 ? answer.fields : { all: answer.message });
  }

  return (
    <DraftDialog
      title="New rule"
      description="It begins as a draft: nothing moves until you put it into force."
      write="Write the draft"
      failure={errors.all}
      onWrite={() => void create()}
      {...{ busy, onClose }}
    >
      <ChannelSelect
        label="Runs"
        value={channelKey}
        error={errors.channel}
        channels={channels}
        onChoose={setChannel}
      />
      <Select
        label="Goes by"
        value={pointKey}
        error={errors['body.point']}
        onChange={(event) => setPoint(event.target.value)}
      >
        <option value="">Choose …</option>
        {points
          .filter((point) => point.unit === 'Cel')
          .map((point) => (
            <option key={point.key} value={point.key}>
              {point.name}
            </option>
          ))}
      </Select>
      <TextField
        label="Name"
        value={name}
        error={errors.name}
        onChange={(event) => setName(event.target.value)}
      />
      {body === null ? null : (
        <p className="font-serif text-[1.1rem]">
          <Phrases phrases={ruleSentence(RuleBody.parse(body), names, preferences)} />
        </p>
      )}
    </DraftDialog>
  );
}
