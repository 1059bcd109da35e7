import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import type { Training } from '@/lib/schema/training';
import { moment } from '@/lib/units/time';
import type { Preferences } from '@/lib/units/preferences';
import { FAULT_WORDS, TRAINING_INTRO, faultAbout } from '@/lib/wording/training';
import { EndFault, StartFault } from './training-form';

/** Faults for training: only where the simulated yard drives the house; elsewhere there is no such panel. */
export function TrainingPanel({
  training,
  house,
  mayOrder,
  zone,
  now,
  preferences,
}: {
  training: Training;
  house: string;
  mayOrder: boolean;
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  if (!training.available) return null;
  const { faults, points, channels } = training;
  return (
    <Panel title="Faults for training" note="simulated yard only">
      <p className="max-w-[70ch] text-[0.95rem] text-soft">{TRAINING_INTRO}</p>
      {faults.length === 0 ? (
        <p className="py-3">No fault is switched on.</p>
      ) : (
        <ul
          className="my-3 divide-y divide-line border-y border-line"
          aria-label="Faults that are switched on"
        >
          {faults.map((fault) => (
            <li
              key={`${fault.fault} ${fault.point ?? ''} ${fault.channel ?? ''}`}
              className="flex flex-wrap items-start justify-between gap-x-4 gap-y-1 py-3"
            >
              <div className="max-w-[70ch] min-w-0">
                <p>
                  <Phrases phrases={faultAbout(fault)} />, until{' '}
                  {moment(Date.parse(fault.until), now, zone, preferences)}
                </p>
                <p className="text-[0.9rem] text-soft">{FAULT_WORDS[fault.fault]?.what}</p>
                <p className="mt-1 text-[0.9rem] font-semibold">What should be seen</p>
                <ul className="list-disc pl-5 text-[0.9rem] text-soft">
                  {FAULT_WORDS[fault.fault]?.seen.map((line) => (
                    <li key={line}>{line}</li>
                  ))}
                </ul>
              </div>
              {mayOrder ? <EndFault house={house} fault={fault} /> : null}
            </li>
          ))}
        </ul>
      )}
      {mayOrder ? <StartFault house={house} points={points} channels={channels} /> : null}
    </Panel>
  );
}
