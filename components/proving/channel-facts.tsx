import { Figures, Panel } from '@/components/ui/panel';
import type { Channel } from '@/lib/schema/yard-view';
import { protectionWords } from '@/lib/wording/protection';
import { circuitWords, LOAD_WORDS, ratedWords, safeStateWords } from '@/lib/wording/wiring-load';

/** What is on the terminals: to hold beside the plate. */
export function ChannelFacts({ channel }: { channel: Channel }) {
  const { load, contact, protection } = channel;
  return (
    <Panel title={channel.label}>
      <Figures
        rows={[
          { name: 'Where', value: `${channel.node}, relay ${channel.relay}` },
          { name: 'Load', value: LOAD_WORDS[load.kind] ?? load.kind },
          { name: 'Circuit', value: circuitWords(load) },
          { name: 'Rated', value: ratedWords(load) },
          {
            name: 'Contact',
            value: contact,
            note: `Commanded by nothing: ${safeStateWords(contact, load.kind).toLowerCase()}`,
          },
          ...(protection === null ? [] : [{ name: 'Protection', value: protectionWords(protection) }]),
        ]}
      />
    </Panel>
  );
}
