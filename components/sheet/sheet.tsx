import { QrCode } from '@/components/ui/qr-code';
import type { Channel } from '@/lib/schema/yard-view';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock, day } from '@/lib/units/time';
import { LOCAL_CODE, withoutSoftware, type SheetLoad } from '@/lib/wording/sheet';
import {
  LAST_RESORT_CAUTION,
  LOCKOUT_CAUTION,
  LOOP_CAUTION,
  MAINS_CAUTION,
} from '@/lib/wording/wiring-parts';
import { Limits } from './limits';
import { PanelTable } from './panel-table';
import { PaperChoice, type Paper } from './paper-choice';
import { Sensors } from './sensors';
import type { SheetData } from './sheet-data';
import { Signatures } from './signatures';

/** The sheet on the panel's door: first what to do while nothing answers, then what is wired where. */
export function Sheet({
  data,
  paper,
  address,
  holding,
  preferences,
  now,
}: {
  data: SheetData;
  /** Null: as the printer has it. */
  paper: Paper | null;
  /** Of the page that always shows how things stand. */
  address: string;
  holding: string;
  preferences: Preferences;
  now: number;
}) {
  const { house, nodes, channels, lockouts } = data;
  const { zone } = house;
  const standing = lockouts.filter((one) => one.removedAt === null);
  const cautions = [MAINS_CAUTION, LOCKOUT_CAUTION, LOOP_CAUTION, LAST_RESORT_CAUTION, LOCAL_CODE];
  return (
    <div className="flex flex-col gap-4">
      <PaperChoice house={house.slug} paper={paper} />
      <article
        data-sheet={house.slug}
        className={`flex flex-col gap-5 rounded-lg border border-line bg-sheet p-4 text-[0.95rem] print:block print:border-0 print:p-0 print:text-[9.5pt] print:*:mt-3 print:[&_table]:text-[8.5pt] print:[&_td]:py-1 print:[&_th]:py-1 ${paper === null ? '' : `paper-${paper}`}`}
      >
        <header className="flex items-start justify-between gap-4">
          <div className="min-w-0">
            <h1 className="font-serif text-2xl font-semibold">Wiring of {house.name}</h1>
            <p className="text-soft">
              {holding}. As it stood on {day(now, zone)} {new Date(now).getUTCFullYear()},{' '}
              {clock(now, zone, preferences)}. A later change makes this sheet wrong: print it anew.
            </p>
            <p className="mt-1 font-mono text-[0.85rem] wrap-anywhere">{address}</p>
          </div>
          <QrCode isOnPaper text={address} label={`The address of this house’s wiring, ${address}`} />
        </header>
        {standing.length === 0 ? null : (
          <p className="border-l-4 border-alarm pl-3 font-semibold">
            Locked out as this was printed:{' '}
            {standing.map((one) => `${one.channel} (${one.why}, ${one.by})`).join('; ')}.
          </p>
        )}
        <section className="rounded-md border-2 border-ink p-3 print:break-inside-avoid">
          <h2 className="font-semibold">How to run the fan without software</h2>
          <ol className="mt-1 flex list-decimal flex-col gap-1 pl-5">
            {withoutSoftware(
              channels.map((one) => loadOf(one, data)),
              house.lastResort,
              preferences,
            ).map((step) => (
              <li key={step}>{step}</li>
            ))}
          </ol>
        </section>
        {nodes.map((node) => (
          <PanelTable key={node.id} node={node} {...{ data, zone, preferences }} />
        ))}
        <Limits {...{ data, preferences }} />
        <Sensors {...{ data, zone, now, preferences }} />
        <section className="print:break-inside-avoid">
          <h2 className="font-semibold">Thermostat of last resort</h2>
          <p>
            {house.lastResort === null
              ? 'None is recorded.'
              : `Set to ${temperature(house.lastResort.below, preferences)}; ${house.lastResort.provedOn === null ? 'nobody has seen it work yet' : `seen to work on ${house.lastResort.provedOn}`}.`}
          </p>
        </section>
        <section className="print:break-inside-avoid">
          <h2 className="font-semibold">Cautions</h2>
          <ul className="flex list-disc flex-col gap-1 pl-5">
            {cautions.map((one) => (
              <li key={one}>{one}</li>
            ))}
          </ul>
        </section>
        <Signatures />
      </article>
    </div>
  );
}

function loadOf(channel: Channel, { sources, rests }: SheetData): SheetLoad {
  const source = sources.find((one) => one.slug === channel.source);
  return {
    ...{ number: channel.number, label: channel.label, contact: channel.contact, kind: channel.load.kind },
    isDraw: source?.kind === 'heap' || source?.kind === 'ground',
    rest: rests[channel.key] ?? null,
  };
}
