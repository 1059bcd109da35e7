import { Phrases } from '@/components/ui/sentence';
import { CardCell, CardRow, CardRowHead, type CardColumn } from '@/components/ui/card-table';
import type { Channel, Lockout, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import { circuitWords, contactFit, LOAD_WORDS, ratedWords, safeStateWords } from '@/lib/wording/wiring-load';
import { ChangeButton } from './editing';
import { FallbackLine, type Alone } from './fallback-line';
import { LockOutButton } from './lock-out';
import { ProvedCell, type LastProof } from './proved-cell';

const TERM = {
  number: 'Ch',
  load: 'Load',
  circuit: 'Circuit',
  rated: 'Rated',
  contact: 'Contact',
  safe: 'With nothing to command it',
  proved: 'Proved',
};
export const CHANNEL_COLUMNS: readonly CardColumn[] = [
  { key: 'number', label: TERM.number },
  { key: 'load', label: TERM.load },
  { key: 'circuit', label: TERM.circuit },
  { key: 'rated', label: TERM.rated, figure: true },
  { key: 'contact', label: TERM.contact },
  { key: 'safe', label: TERM.safe },
  { key: 'proved', label: TERM.proved },
  { key: 'act', label: 'Change', labelHidden: true },
];

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
    <CardRow>
      <CardCell term={TERM.number} className="font-semibold tabular-nums">
        {channel.number}
      </CardCell>
      <CardRowHead className="min-w-44">
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
      </CardRowHead>
      <CardCell term={TERM.circuit}>
        <span className="whitespace-nowrap">{circuitWords(channel.load)}</span>
        <span className="block text-[0.85rem] text-soft">
          {channel.node}, relay {channel.relay}
        </span>
      </CardCell>
      <CardCell term={TERM.rated} figure>
        {ratedWords(channel.load)}
        {fit === null ? null : (
          <span className="block font-sans text-[0.85rem] whitespace-normal text-soft sm:ml-auto sm:max-w-48">
            <Phrases phrases={fit.words} />
          </span>
        )}
      </CardCell>
      <CardCell term={TERM.contact}>{channel.contact}</CardCell>
      <CardCell term={TERM.safe}>{safeStateWords(channel.contact, channel.load.kind)}</CardCell>
      <CardCell term={TERM.proved}>
        <ProvedCell
          channel={channel}
          house={house}
          zone={zone}
          proof={proof}
          preferences={reading.preferences}
        />
      </CardCell>
      <CardCell className="align-middle">
        <div className="flex flex-wrap max-sm:-ml-4 sm:justify-end">
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
      </CardCell>
    </CardRow>
  );
}
