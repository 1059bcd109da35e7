import { Notice } from '@/components/ui/notice';
import { CardTable } from '@/components/ui/card-table';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import type { Channel, Lockout, Source } from '@/lib/schema/yard-view';
import { isMains, SHARE_NOTE } from '@/lib/wording/wiring-load';
import { MAINS_CAUTION } from '@/lib/wording/wiring-parts';
import { CHANNEL_COLUMNS, ChannelRow, type ChannelReading } from './channel-row';
import { AddButton } from './editing';
import type { LastProof } from './proved-cell';

/** Channels with what they carry, what they fall to, and whether somebody saw them run. */
export function Channels({
  channels,
  sources,
  lockouts,
  house,
  hasNode,
  proofs,
  ...reading
}: ChannelReading & {
  channels: Channel[];
  sources: Source[];
  lockouts: Lockout[];
  house: string;
  hasNode: boolean;
  /** The last proof of each channel that was proved, by its id. */
  proofs: Record<string, LastProof>;
}) {
  return (
    <Panel
      title="Channels"
      actions={
        hasNode ? (
          <>
            <AddButton kind="channel" label="Add a channel…" />
            <AddButton kind="reversing-vent" label="A reversing vent…" />
          </>
        ) : undefined
      }
    >
      {channels.length === 0 ? (
        <Empty title="No channel yet.">
          A channel is one relay with its load.{' '}
          {hasNode
            ? 'Add the first once its relay is wired.'
            : 'Register the node that carries the relay first.'}
        </Empty>
      ) : (
        <CardTable caption="Channels" columns={CHANNEL_COLUMNS}>
          {channels.map((channel) => (
            <ChannelRow
              key={channel.id}
              channel={channel}
              source={sources.find((one) => one.slug === channel.source)}
              lockout={lockouts.find((one) => one.channel === channel.key && one.removedAt === null)}
              house={house}
              proof={proofs[channel.id]}
              {...reading}
            />
          ))}
        </CardTable>
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
