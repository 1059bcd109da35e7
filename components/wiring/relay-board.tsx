import { classes } from '@/components/ui/classes';
import { Panel } from '@/components/ui/panel';
import type { StateChannel } from '@/lib/schema/house-state';
import type { Channel, FieldNode } from '@/lib/schema/yard-view';
import { NO_WATCHDOG } from '@/lib/wording/bus';

/** A contact is closed where its load has current, whichever way it is wired. */
function Contact({ state, contact }: { state: 'on' | 'off' | null; contact: 'NO' | 'NC' }) {
  const isClosed = state === 'on';
  return (
    <svg aria-hidden="true" viewBox="0 0 64 30" className="w-full max-w-20">
      <g
        className={classes(
          'fill-current stroke-current',
          isClosed ? 'text-ember' : state === null ? 'text-edge' : 'text-ink',
        )}
      >
        <circle cx="12" cy="22" r="3" stroke="none" />
        <circle cx="52" cy="22" r="3" stroke="none" />
        <path
          d={isClosed ? 'M12 22H52' : 'M12 22 45 9'}
          fill="none"
          strokeWidth="2.4"
          strokeDasharray={state === null ? '3 3' : undefined}
        />
        {/* the fixed contact of an NC relay stands on the arm's side of rest */}
        {contact === 'NC' ? <path d="M52 22V12h-6" fill="none" strokeWidth="1.6" /> : null}
      </g>
    </svg>
  );
}

function Relay({
  relay,
  channel,
  reported,
}: {
  relay: number;
  channel: Channel | undefined;
  reported: 'on' | 'off' | null;
}) {
  if (channel === undefined) {
    return (
      <li className="flex min-h-28 flex-col justify-between rounded-md border border-line bg-sheet/60 p-2 text-[0.85rem] text-soft">
        <span className="font-semibold tabular-nums">{relay}</span>
        <span className="text-center">spare</span>
      </li>
    );
  }
  return (
    <li className="flex min-h-28 flex-col justify-between rounded-md border border-ink bg-sheet p-2 text-[0.85rem]">
      <span className="flex justify-between gap-1">
        <span className="font-semibold tabular-nums">
          <span className="sr-only">Relay </span>
          {relay}
        </span>
        <span className={reported === 'on' ? 'text-ember' : 'text-soft'}>
          {reported === null ? 'not told' : reported === 'on' ? 'closed' : 'open'}
        </span>
      </span>
      <span className="flex justify-center py-1">
        <Contact state={reported} contact={channel.contact} />
      </span>
      <span className="text-center leading-tight hyphens-auto">
        {channel.label}
        <span className="block text-soft">
          channel {channel.number}, {channel.contact}
        </span>
      </span>
    </li>
  );
}

/** The relays of one node as they lie on its board, each with its contact as it was last reported. */
export function RelayBoard({
  node,
  channels,
  states,
}: {
  node: FieldNode;
  channels: Channel[];
  states: StateChannel[];
}) {
  if (node.channels === 0) return null;
  return (
    <Panel title={`Relay board of node ${node.key}`}>
      {node.kind === 'modbus' && (node.modbus?.watchdog ?? null) === null ? (
        <p className="mb-2 text-warn">{NO_WATCHDOG}</p>
      ) : null}
      <ol className="grid grid-cols-3 gap-2 rounded-lg bg-earth p-2 sm:grid-cols-4 xl:grid-cols-8">
        {Array.from({ length: node.channels }, (_, place) => {
          const channel = channels.find((one) => one.node === node.key && one.relay === place + 1);
          const state = states.find((one) => one.key === channel?.key);
          return <Relay key={place} relay={place + 1} channel={channel} reported={state?.reported ?? null} />;
        })}
      </ol>
    </Panel>
  );
}
