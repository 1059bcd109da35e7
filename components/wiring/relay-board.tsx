import { classes } from '@/components/ui/classes';
import { Panel } from '@/components/ui/panel';
import type { StateChannel } from '@/lib/schema/house-state';
import type { Channel, FieldNode } from '@/lib/schema/yard-view';
import { NO_WATCHDOG } from '@/lib/wording/bus';
import { relayWords, type RelayWords } from '@/lib/wording/relay';
import { RelayDrawing } from './relay-drawing';

function Spare({ relay }: { relay: number }) {
  return (
    <li className="flex min-h-36 flex-col justify-between rounded-md border border-line bg-sheet/60 p-2 text-[0.85rem] text-soft">
      <span className="font-semibold tabular-nums">
        <span className="sr-only">Relay </span>
        {relay}
      </span>
      <span className="text-center">spare</span>
      <span />
    </li>
  );
}

function Relay({ relay, channel, words }: { relay: number; channel: Channel; words: RelayWords }) {
  const isFault = words.fault !== null;
  return (
    <li
      className={classes(
        'flex min-h-36 flex-col justify-between gap-1 rounded-md border bg-sheet p-2 text-[0.85rem]',
        isFault ? 'border-2 border-alarm' : 'border-ink',
      )}
    >
      <span className="flex justify-between gap-1">
        <span className="font-semibold tabular-nums">
          <span className="sr-only">Relay </span>
          {relay}
        </span>
        <span className="text-soft">{channel.contact}</span>
      </span>
      <span className="flex justify-center">
        <RelayDrawing
          contact={channel.contact}
          isCoilOn={words.coil === 'coil not told' ? null : words.coil === 'coil on'}
          isClosed={words.isClosed}
        />
      </span>
      <span className="text-center leading-tight">
        <span className="font-semibold hyphens-auto">{channel.label}</span>
        <span className="block text-soft">channel {channel.number}</span>
      </span>
      <ul className="leading-tight">
        <li>{words.coil}</li>
        <li>{words.contact}</li>
        <li className={words.isClosed === true ? 'font-semibold text-ember' : undefined}>{words.load}</li>
        {words.wanted === null ? null : <li className="font-semibold text-warn">{words.wanted}</li>}
      </ul>
      {isFault ? <p className="font-semibold text-alarm">{words.fault}</p> : null}
    </li>
  );
}

/** The relays of one node as they lie on its board: what each was ordered, and its coil, contact and load as last reported. */
export function RelayBoard({
  node,
  channels,
  states,
  channelAlarms,
}: {
  node: FieldNode;
  channels: Channel[];
  states: StateChannel[];
  /** Kinds of the alarms that stand, by the channel's key. */
  channelAlarms: Readonly<Record<string, string[]>>;
}) {
  if (node.channels === 0) return null;
  return (
    <Panel
      title={`Relay board of node ${node.key}`}
      note="The node tells what its coils are. Contact and load follow from that, until a run proof shows otherwise."
    >
      {node.kind === 'modbus' && (node.modbus?.watchdog ?? null) === null ? (
        <p className="mb-2 text-warn">{NO_WATCHDOG}</p>
      ) : null}
      <ol className="grid grid-cols-2 gap-2 rounded-lg bg-earth p-2 sm:grid-cols-4 xl:grid-cols-8">
        {Array.from({ length: node.channels }, (_, place) => {
          const channel = channels.find((one) => one.node === node.key && one.relay === place + 1);
          if (channel === undefined) return <Spare key={place} relay={place + 1} />;
          const state = states.find((one) => one.key === channel.key);
          const words = relayWords({
            contact: channel.contact,
            wanted: state?.state ?? null,
            reported: state?.reported ?? null,
            alarms: channelAlarms[channel.key] ?? [],
          });
          return <Relay key={place} relay={place + 1} channel={channel} words={words} />;
        })}
      </ol>
    </Panel>
  );
}
