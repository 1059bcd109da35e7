import { Phrases } from '@/components/ui/sentence';
import { Cell, Row, RowHead } from '@/components/ui/table';
import type { Channel, Lockout, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import { circuitWords, contactFit, LOAD_WORDS, ratedWords, safeStateWords } from '@/lib/wording/wiring-load';
import { ChangeButton } from './editing';
import { FallbackLine, type Alone } from './fallback-line';
import { LockOutButton } from './lock-out';
import { ProvedCell, type LastProof } from './proved-cell';

/** What a channel's fallback is read with. */
export interface ChannelReading {
  alone: Alone;
  points: Point[];
  zone: string;
  /** Epoch ms of app time. */
  now: number;
  preferences: Preferences;
}

/** One channel: its load and circuit, what it falls to, and whether somebody saw it run. */
export function ChannelRow({
  channel,
  source,
  lockout,
  zone,
  house,
  proof,
  ...reading
}: ChannelReading & {
  channel: Channel;
  source: Source | undefined;
  lockout: Lockout | undefined;
  house: string;
  proof: LastProof | undefined;
}) {
  const fit = contactFit(channel.load);
  return (
    <Row>
      <Cell className="font-semibold tabular-nums">{channel.number}</Cell>
      <RowHead className="min-w-44">
        {channel.label}
        <span className="block text-[0.85rem] font-normal text-soft">
          {LOAD_WORDS[channel.load.kind]}
          {source === undefined ? '' : `, from the ${source.name.toLowerCase()}`}
          {channel.frostHelp ? ', helps against frost' : ''}. At least {exactly(channel.minOn)} on,{' '}
          {exactly(channel.minOff)} off.
        </span>
        <FallbackLine channel={channel} zone={zone} {...reading} />
        {lockout === undefined ? null : (
          <span className="block text-[0.9rem] text-warn">Locked out: {lockout.why}</span>
        )}
      </RowHead>
      <Cell>
        <span className="whitespace-nowrap">{circuitWords(channel.load)}</span>
        <span className="block text-[0.85rem] text-soft">
          {channel.node}, relay {channel.relay}
        </span>
      </Cell>
      <Cell figure>
        {ratedWords(channel.load)}
        {fit === null ? null : (
          <span className="ml-auto block max-w-48 font-sans text-[0.85rem] whitespace-normal text-soft">
            <Phrases phrases={fit.words} />
          </span>
        )}
      </Cell>
      <Cell wideOnly>{channel.contact}</Cell>
      <Cell>{safeStateWords(channel.contact, channel.load.kind)}</Cell>
      <Cell>
        <ProvedCell
          channel={channel}
          house={house}
          zone={zone}
          proof={proof}
          preferences={reading.preferences}
        />
      </Cell>
      <Cell className="align-middle">
        <div className="flex justify-end">
          <ChangeButton kind="channel" id={channel.id} of={channel.label} />
          {lockout === undefined ? (
            <LockOutButton
              house={house}
              channel={channel.key}
              label={channel.label}
              contact={channel.contact}
            />
          ) : null}
        </div>
      </Cell>
    </Row>
  );
}
