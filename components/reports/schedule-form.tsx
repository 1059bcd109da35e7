'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/check';
import { Select } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { type ReportSection, SPANS } from '@/lib/schema/report';
import { SPAN_WORDS } from './words';

/** Sends the sections that are shown above. */
export function ScheduleForm({
  house,
  members,
  sections,
}: {
  house: string;
  members: readonly { name: string; email: string }[];
  sections: readonly ReportSection[];
}) {
  const router = useRouter();
  const [span, setSpan] = useState('week');
  const [to, setTo] = useState<string[]>([]);
  const [failure, setFailure] = useState('');
  const [isBusy, setBusy] = useState(false);
  async function save() {
    if (to.length === 0) return setFailure('Choose who gets it.');
    setBusy(true);
    const answer = await send('POST', `/houses/${house}/report-schedules`, { span, sections, to });
    setBusy(false);
    setFailure(answer.ok ? '' : answer.message);
    if (!answer.ok) return;
    setTo([]);
    say('The report will be sent when its nights have ended.');
    router.refresh();
  }
  return (
    <fieldset className="mt-3 flex flex-col gap-2 border-t border-line pt-3">
      <legend className="sr-only">One more report by mail</legend>
      <Select
        label="When it has ended, send the report of each"
        hint="With the sections that are shown above, on the afternoon after its last night."
        className="max-w-72"
        value={span}
        onChange={(event) => setSpan(event.target.value)}
      >
        {SPANS.map((one) => (
          <option key={one} value={one}>
            {SPAN_WORDS[one].toLowerCase()}
          </option>
        ))}
      </Select>
      <div className="flex flex-wrap gap-x-5">
        {members.map(({ name, email }) => (
          <Checkbox
            key={email}
            label={`${name}, ${email}`}
            checked={to.includes(email)}
            onChange={(event) =>
              setTo(event.target.checked ? [...to, email] : to.filter((one) => one !== email))
            }
          />
        ))}
      </div>
      <Button className="self-start" busy={isBusy} onClick={() => void save()}>
        Send it by mail
      </Button>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </fieldset>
  );
}
