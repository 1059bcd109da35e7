import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Channel, FieldNode } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { fallbackWords } from '@/lib/wording/alone';
import { gainWords } from '@/lib/wording/proving';
import { protectionOnPaper } from '@/lib/wording/sheet';
import { circuitWords, LOAD_WORDS, ratedWords, safeStateWords } from '@/lib/wording/wiring-load';
import { NODE_WORDS } from '@/lib/wording/wiring-parts';
import type { SheetData } from './sheet-data';

const columns = [
  { key: 'relay', label: 'Relay' },
  { key: 'load', label: 'Channel and load' },
  { key: 'circuit', label: 'Circuit' },
  { key: 'protection', label: 'Protection' },
  { key: 'safe', label: 'With nothing to command it' },
  { key: 'proved', label: 'Proved' },
];

/** One board, terminal after terminal, spare ones too: whoever opens the panel counts them. */
export function PanelTable({
  node,
  data,
  zone,
  preferences,
}: {
  node: FieldNode;
  data: SheetData;
  zone: string;
  preferences: Preferences;
}) {
  const own = data.channels.filter((one) => one.node === node.key);
  const highest = Math.max(node.channels, ...own.map((one) => one.relay));
  const relays = Array.from({ length: highest }, (_, place) => place + 1);
  const spare = relays.filter((relay) => own.every((one) => one.relay !== relay));
  return (
    <section>
      <h2 className="font-semibold">
        Panel <span className="font-mono">{node.key}</span>
      </h2>
      <p className="text-soft">
        {NODE_WORDS[node.kind]}; {node.channels} relays, reports every {node.reportEvery}&nbsp;s.
        {spare.length === 0 ? '' : ` Spare: ${spare.join(', ')}.`}
      </p>
      {own.length === 0 ? null : (
        <Table caption={`Terminals of ${node.key}`} captionHidden columns={columns}>
          {relays.map((relay) => {
            const channel = own.find((one) => one.relay === relay);
            return channel === undefined ? null : (
              <Terminal key={relay} {...{ channel, data, zone, preferences }} />
            );
          })}
        </Table>
      )}
    </section>
  );
}

function Terminal({
  channel,
  data,
  zone,
  preferences,
}: {
  channel: Channel;
  data: SheetData;
  zone: string;
  preferences: Preferences;
}) {
  const { fallback, load } = channel;
  const source = data.sources.find((one) => one.slug === channel.source);
  const point = data.points.find((one) => one.key === fallback?.point)?.name ?? fallback?.point ?? '';
  return (
    <Row className="print:break-inside-avoid">
      <Cell className="font-mono font-semibold">{channel.relay}</Cell>
      <RowHead>
        {channel.number} {channel.label}
        <span className="block text-[0.9em] font-normal text-soft">
          {LOAD_WORDS[load.kind]}
          {source === undefined ? '' : `, from ${source.name}`}
        </span>
      </RowHead>
      <Cell>
        {circuitWords(load)}; {ratedWords(load)}
        <span className="block text-[0.9em] text-soft">
          contact {channel.contact}
          {load.contactAmps === undefined ? ', rating not recorded' : `, ${load.contactAmps} A`}
        </span>
      </Cell>
      <Cell>{protectionOnPaper(channel.protection)}</Cell>
      <Cell>
        {safeStateWords(channel.contact, load.kind)}.
        {fallback === null ? null : (
          <span className="block text-[0.9em]">
            Without the server: {fallbackWords({ ...fallback, point }, preferences)}
          </span>
        )}
      </Cell>
      <Cell>{provedOf(channel, data.proofs[channel.id], zone, preferences)}</Cell>
    </Row>
  );
}

function provedOf(
  { provedAt }: Channel,
  proof: SheetData['proofs'][string] | undefined,
  zone: string,
  preferences: Preferences,
) {
  if (provedAt === null) return <strong>Not proved</strong>;
  const when = `${day(Date.parse(provedAt), zone)} ${provedAt.slice(0, 4)}`;
  if (proof === undefined) return when;
  const { by, gain } = proof;
  return (
    <>
      {when}, by {by}
      {gain === null ? null : (
        <span className="block text-[0.9em]">
          {gainWords(gain.kelvin, gain.sd, gain.seconds, preferences)}
        </span>
      )}
    </>
  );
}
