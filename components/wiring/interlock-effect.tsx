'use client';
import type { UseFormReturn } from 'react-hook-form';
import { Notice } from '@/components/ui/notice';
import type { InterlockReplay } from '@/lib/schema/interlock-replay';
import type { Preferences } from '@/lib/units/preferences';
import { interlockRefusal, replayWords } from '@/lib/wording/interlock-replay';
import type { Yard } from './forms/options';
import { interlockGroups } from './forms/loop';
import { InterlockDrawing } from './interlock-drawing';
import type { Lock } from './interlock-layout';
import { bodyOf } from './spec';
import { usePolled } from './use-polled';

/** Nights do not change while somebody types; once in a while is only for who leaves the form open. */
const EVERY_MS = 300_000;

/** What the interlock that is being typed would do: drawn with the others, refused beforehand, and held against the last nights. */
export function InterlockEffect({
  form,
  yard,
  id,
  preferences,
}: {
  form: UseFormReturn;
  yard: Yard;
  /** Of the one that is changed; null: a new one. */
  id: string | null;
  preferences: Preferences;
}) {
  const { body } = bodyOf(interlockGroups(yard), form.watch(), preferences);
  const { channel, kind, other, delay } = body;
  const isThere = (key: unknown): key is string => yard.channels.some((one) => one.key === key);
  const isKind = kind === 'never-with' || kind === 'needs';
  const drafted: Lock | null = isKind && isThere(channel) && isThere(other) ? { channel, kind, other } : null;
  const others = yard.interlocks.filter((one) => one.id !== id);
  const labelOf = (key: string) => yard.channels.find((one) => one.key === key)?.label ?? key;
  const refusal = drafted === null ? null : interlockRefusal(drafted, others, labelOf);
  const wait = typeof delay === 'number' && delay >= 0 && delay <= 3600 ? Math.round(delay) : 0;
  const paths =
    drafted === null || refusal !== null
      ? []
      : [
          `/houses/${yard.house.slug}/interlock-replay?channel=${drafted.channel}&kind=${drafted.kind}&other=${drafted.other}&delay=${wait}`,
        ];
  const { answers, isLost } = usePolled<InterlockReplay>(paths, EVERY_MS);
  const replay = answers?.[0];
  return (
    <div className="flex flex-col gap-3">
      <InterlockDrawing
        channels={yard.channels}
        locks={[...others, ...(drafted === null ? [] : [{ ...drafted, isDraft: true }])]}
      />
      <div aria-live="polite">
        {refusal !== null ? (
          <Notice tone="warn" title="This would be refused">
            {refusal}
          </Notice>
        ) : drafted === null ? null : (
          <p
            data-replay={replay?.count}
            className="rounded-lg border border-line bg-paper p-3 text-[0.95rem]"
          >
            {replay !== undefined
              ? replayWords(replay, drafted.kind)
              : isLost
                ? 'What it would have prevented is not known: the server does not answer.'
                : 'Looking at the last nights…'}
          </p>
        )}
      </div>
    </div>
  );
}
