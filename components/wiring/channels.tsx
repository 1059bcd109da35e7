import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { day } from '@/lib/units/time';
import type { Channel, Lockout, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import {
  SHARE_NOTE,
  circuitWords,
  contactFit,
  isMains,
  LOAD_WORDS,
  ratedWords,
  safeStateWords,
} from '@/lib/wording/wiring-load';
import { MAINS_CAUTION } from '@/lib/wording/wiring-parts';
import { AddButton, ChangeButton } from './editing';
import { FallbackLine, type Alone } from './fallback-line';
import { LockOutButton } from './lock-out';

const columns = [
  { key: 'number', label: 'Ch', figure: false },
  { key: 'load', label: 'Load' },
  { key: 'circuit', label: 'Circuit' },
  { key: 'rated', label: 'Rated', figure: true },
  { key: 'contact', label: 'Contact', wideOnly: true },
  { key: 'safe', label: 'With nothing to command it' },
  { key: 'proved', label: 'Proved' },
  { key: 'act', label: 'Change', labelHidden: true },
];

/** What a channel's fallback is read with. */
interface Reading {
  alone: Alone;
  points: Point[];
  zone: string;
  /** Epoch ms of app time. */
  now: number;
  preferences: Preferences;
}

function ChannelRow({
  channel,
  source,
  lockout,
  zone,
  house,
  ...reading
}: Reading & {
  channel: Channel;
  source: Source | undefined;
  lockout: Lockout | undefined;
  house: string;
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
        {channel.provedAt === null ? (
          <span className="font-semibold text-warn">Not proved</span>
        ) : (
          <span className="whitespace-nowrap">{day(Date.parse(channel.provedAt), zone)}</span>
        )}
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

/** Channels with what they carry, what they fall to, and whether somebody saw them run. */
export function Channels({
  channels,
  sources,
  lockouts,
  house,
  hasNode,
  ...reading
}: Reading & {
  channels: Channel[];
  sources: Source[];
  lockouts: Lockout[];
  house: string;
  hasNode: boolean;
}) {
  return (
    <Panel
      title="Channels"
      actions={hasNode ? <AddButton kind="channel" label="Add a channel…" /> : undefined}
    >
      {channels.length === 0 ? (
        <Empty title="No channel yet.">
          A channel is one relay with its load.{' '}
          {hasNode
            ? 'Add the first once its relay is wired.'
            : 'Register the node that carries the relay first.'}
        </Empty>
      ) : (
        <Table caption="Channels" captionHidden columns={columns}>
          {channels.map((channel) => (
            <ChannelRow
              key={channel.id}
              channel={channel}
              source={sources.find((one) => one.slug === channel.source)}
              lockout={lockouts.find((one) => one.channel === channel.key && one.removedAt === null)}
              house={house}
              {...reading}
            />
          ))}
        </Table>
      )}
      {channels.length === 0 ? null : <p className="mt-2 text-[0.85rem] text-soft">{SHARE_NOTE}</p>}
      {channels.some((one) => isMains(one.load)) ? (
        <div className="mt-3">
          <Notice tone="warn" title="Mains in a damp house">
            {MAINS_CAUTION}
          </Notice>
        </div>
      ) : null}
    </Panel>
  );
}
