'use client';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { rcdTest, rcdWords, ratingVerdict } from '@/lib/wording/protection';
import { SHARE_NOTE } from '@/lib/wording/wiring-load';
import { BIG } from './big';
import { useProving } from './context';
import { DoneButton } from './done-button';

/** The load against its contact: reckoned, and refused with the arithmetic where it is too much. */
export function RatingStep() {
  const { channel, house, today } = useProving();
  const { load, protection, highLimit } = channel;
  const verdict = ratingVerdict(load, protection, highLimit !== null);
  const isDue = protection !== null && rcdTest(protection, today).state === 'due';
  return (
    <div className="flex flex-col gap-3">
      <p className={verdict.isFit ? 'font-semibold' : 'font-semibold text-alarm'}>{verdict.words}</p>
      <p className="text-[0.9rem] text-soft">{SHARE_NOTE}</p>
      {protection === null ? null : isDue ? (
        <Notice tone="warn" title="The residual-current device is due for its test">
          {rcdWords(protection, today)} Press its test button, and write the date down in the channel’s form.
        </Notice>
      ) : (
        <p className="text-[0.9rem] text-soft">{rcdWords(protection, today)}</p>
      )}
      {verdict.isFit ? (
        <DoneButton step="rating">It fits the plate</DoneButton>
      ) : (
        <ButtonLink href={`/${house.slug}/wiring`} className={BIG}>
          To the channel’s form
        </ButtonLink>
      )}
    </div>
  );
}
