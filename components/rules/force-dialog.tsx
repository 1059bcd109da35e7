'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Phrases } from '@/components/ui/sentence';
import type { Answer } from '@/components/ui/send';
import type { RuleBody } from '@/lib/control/rule-body';
import type { Preferences } from '@/lib/units/preferences';
import { ruleSentence } from '@/lib/wording/rule';
import { changeWords, ruleChanges } from '@/lib/wording/rule-changes';
import type { RuleNames } from '@/lib/wording/rule-names';

/** What has to be typed where nobody has seen the relay move this load. */
const CONSENT = 'run it unproved';

/** Says what will change and asks why; on an unproved channel it wants a consent in words. */
export function ForceDialog({
  body,
  names,
  preferences,
  inForce,
  version,
  channelLabel,
  isProved,
  onForce,
  onClose,
}: {
  body: RuleBody;
  names: RuleNames;
  preferences: Preferences;
  /** Null: nothing is in force yet. */
  inForce: RuleBody | null;
  version: number;
  channelLabel: string;
  isProved: boolean;
  /** `consent` is what was typed; null on a proved channel. */
  onForce: (why: string, consent: string | null) => Promise<Answer<unknown>>;
  onClose: () => void;
}) {
  const changes = inForce === null ? null : ruleChanges(inForce, body, names, preferences);
  const [why, setWhy] = useState('');
  const [consent, setConsent] = useState('');
  const [errors, setErrors] = useState<{ why?: string; consent?: string; all?: string }>({});
  const [busy, setBusy] = useState(false);

  async function force() {
    const hasConsent = isProved || consent.trim().toLowerCase() === CONSENT;
    const wrong = {
      ...(why.trim() === '' ? { why: 'Say why in a few words: it stays beside this version.' } : {}),
      ...(hasConsent ? {} : { consent: `Type “${CONSENT}”, or have the channel proved first.` }),
    };
    setErrors(wrong);
    if (Object.keys(wrong).length > 0) return;
    setBusy(true);
    const answer = await onForce(why, isProved ? null : consent.trim());
    setBusy(false);
    if (answer.ok) return onClose();
    setErrors(answer.fields.why === undefined ? { all: answer.message } : { why: answer.fields.why });
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={`Put version ${version} into force?`}
      description="It decides about the load from the next reading on, within seconds."
      actions={
        <>
          <Button kind="primary" busy={busy} onClick={() => void force()}>
            Put into force
          </Button>
          <Button onClick={onClose}>Not yet</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {errors.all}
          </p>
        </>
      }
    >
      {changes === null ? (
        <p className="font-serif text-lg">
          <Phrases phrases={ruleSentence(body, names, preferences)} />
        </p>
      ) : changes.length === 0 ? (
        <p>It says the same as the version in force.</p>
      ) : (
        <ul className="list-disc pl-5">
          {changes.map((change) => (
            <li key={`${change.path} ${change.label}`}>{changeWords(change)}</li>
          ))}
        </ul>
      )}
      {isProved ? null : (
        <>
          <Notice tone="warn" title={`${channelLabel} is not proved.`}>
            Nobody has seen that this relay moves this load, and the right way round. Have an installer prove
            it, or look at the load yourself while it first runs. Your words are kept beside this version.
          </Notice>
          <TextField
            label={`Type “${CONSENT}” to put it into force all the same`}
            value={consent}
            error={errors.consent}
            onChange={(event) => setConsent(event.target.value)}
          />
        </>
      )}
      <TextArea
        label="Why"
        hint="For whoever reads this in spring."
        value={why}
        error={errors.why}
        onChange={(event) => setWhy(event.target.value)}
      />
    </Dialog>
  );
}
