import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import type { Channel, Interlock } from '@/lib/schema/yard-view';
import { interlockSentence } from '@/lib/wording/wiring-parts';
import { AddButton, ChangeButton } from './editing';
import { InterlockDrawing } from './interlock-drawing';
import { partLine } from './part-line';

/** Which channels must not, or must, run together. */
export function Interlocks({ interlocks, channels }: { interlocks: Interlock[]; channels: Channel[] }) {
  const label = (key: string) => channels.find((one) => one.key === key)?.label ?? key;
  return (
    <Panel
      title="Interlocks"
      actions={channels.length < 2 ? undefined : <AddButton kind="interlock" label="Add an interlock…" />}
    >
      {interlocks.length === 0 ? (
        <p className="text-soft">
          None. A vent that must not open while a fan heats, and a drive with two relays for two directions,
          each want one.
        </p>
      ) : (
        <>
          <InterlockDrawing channels={channels} locks={interlocks} />
          <ul className="divide-y divide-line border-t border-line">
            {interlocks.map((one) => (
              <li key={one.id} className={partLine}>
                <p className="min-w-0 flex-1">
                  <Phrases
                    phrases={interlockSentence({
                      kind: one.kind,
                      channel: label(one.channel),
                      other: label(one.other),
                      delayS: one.delay,
                      frostMayBreak: one.frostMayBreak,
                    })}
                  />
                </p>
                <ChangeButton
                  kind="interlock"
                  id={one.id}
                  of={`of ${label(one.channel)} and ${label(one.other)}`}
                />
              </li>
            ))}
          </ul>
        </>
      )}
    </Panel>
  );
}
