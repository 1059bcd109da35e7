import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { HeapMix, HeapPart } from '@/lib/analysis/material-book';
import { decimal, share } from '@/lib/units/format';
import { mixNotes } from '@/lib/wording/heap-mix';
import { MixButton } from './mix-button';
import type { MixStart } from './mix-draft';

const space = '\u00a0';
const thousands = (kilograms: number) => decimal(kilograms, 0).replace(/(\d)(?=(\d{3})+$)/g, `$1${space}`);

/** What went in since it was built: masses, C:N, water, and what is not known of it. */
export function MixPanel({ mix, start }: { mix: HeapMix | null; start: MixStart }) {
  const button = <MixButton start={start}>Mix calculator</MixButton>;
  if (mix === null || mix.parts.length === 0)
    return (
      <Panel title="Mix, as built and fed" actions={button}>
        <p className="text-soft">
          What the heap was built of is not in its book. Enter it with its amounts, and carbon, nitrogen and
          water are reckoned from them.
        </p>
      </Panel>
    );
  const { cn, moisture } = mix.mix;
  return (
    <Panel title="Mix, as built and fed" actions={button}>
      <Table
        caption="Mix, as built and fed"
        captionHidden
        columns={[
          { key: 'material', label: 'Material' },
          { key: 'kg', label: 'kg', figure: true },
          { key: 'cn', label: 'C:N', figure: true },
          { key: 'water', label: 'water', figure: true },
        ]}
        foot={
          <Row>
            <RowHead>Together{mix.waterL > 0 ? ', with its water' : ''}</RowHead>
            <Cell figure>{thousands(mix.mix.massKg)}</Cell>
            <Cell figure>{cn === null ? '' : `${decimal(cn, 0)} : 1`}</Cell>
            <Cell figure>{share(moisture)}</Cell>
          </Row>
        }
      >
        {mix.parts.map((part) => (
          <PartRow key={part.name} part={part} />
        ))}
        {mix.waterL === 0 ? null : (
          <Row>
            <RowHead className="font-normal">Water, by can or hose</RowHead>
            <Cell figure>{thousands(mix.waterL)}</Cell>
            <Cell figure />
            <Cell figure>100{space}%</Cell>
          </Row>
        )}
      </Table>
      <ul className="mt-2 flex flex-col gap-1 text-[0.9rem] text-soft">
        {mixNotes(mix).map((note) => (
          <li key={note}>{note}</li>
        ))}
      </ul>
    </Panel>
  );
}

function PartRow({ part: { name, massKg, isFromVolume, known } }: { part: HeapPart }) {
  const cn = known === null || known.nitrogen === 0 ? null : known.carbon / known.nitrogen;
  return (
    <Row>
      <RowHead className="font-normal">
        {name.charAt(0).toUpperCase()}
        {name.slice(1)}
      </RowHead>
      <Cell figure>{massKg === null ? 'not known' : `${isFromVolume ? '≈' : ''}${thousands(massKg)}`}</Cell>
      <Cell figure>{cn === null ? 'not known' : decimal(cn, 0)}</Cell>
      <Cell figure>{known === null ? 'not known' : share(known.moisture)}</Cell>
    </Row>
  );
}
