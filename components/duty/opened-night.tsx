import Link from 'next/link';
import { ButtonLink } from '@/components/ui/button';
import { Figures, Panel } from '@/components/ui/panel';
import type { NightSummary } from '@/lib/analysis/nights';
import { share, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { decisionWords, nightTitle } from '@/lib/wording/duty';
import { addressOf, type DutyAddress } from './address';
import { nightFigures } from './figures';
import { NightStrip, QUARTERS, StripAxis } from './night-strip';

export interface OpenedDecision {
  /** The channel's label, and its key. */
  channel: string;
  key: string;
  at: number;
  state: 'on' | 'off';
  claim: string;
}

/** One night, larger: its strips, its figures, and every decision with what decided it. */
export function OpenedNight({
  house,
  zone,
  address,
  summary,
  decisions,
  nights,
  frostLimitC,
  preferences,
}: {
  house: string;
  zone: string;
  address: DutyAddress;
  summary: NightSummary;
  decisions: OpenedDecision[];
  /** Names of the nights in the table, ascending. */
  nights: string[];
  frostLimitC: number | null;
  preferences: Preferences;
}) {
  const place = nights.indexOf(summary.night);
  const [before, after] = [nights[place - 1], place < 0 ? undefined : nights[place + 1]];
  const to = (night: string | undefined) => `${addressOf(house, address, { night })}#night`;
  const core = summary.coreAtDawn;
  return (
    <div id="night" className="scroll-mt-4">
      <Panel
        title={`The night of ${nightTitle(summary.night)}${summary.complete ? '' : ', so far'}`}
        actions={
          <>
            {before === undefined ? null : <ButtonLink href={to(before)}>Night before</ButtonLink>}
            {after === undefined ? null : <ButtonLink href={to(after)}>Night after</ButtonLink>}
            <ButtonLink href={addressOf(house, address, { night: undefined })}>Close</ButtonLink>
          </>
        }
      >
        <div className="grid gap-x-8 gap-y-4 lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
          <div className="flex min-w-0 flex-col gap-3">
            {summary.strips.map((strip) => (
              <div key={strip.channel}>
                <p className="pb-1 text-[0.9rem]">{strip.label}</p>
                <div className={`border-y border-line py-1 ${QUARTERS}`}>
                  <NightStrip spans={strip.spans} length={(summary.ends - summary.from) / 1000} tall />
                </div>
              </div>
            ))}
            <StripAxis clock={preferences.clock} />
            <Decisions
              house={house}
              decisions={decisions}
              from={summary.from}
              zone={zone}
              preferences={preferences}
              many={summary.strips.length > 1}
            />
          </div>
          <Figures
            rows={[
              ...nightFigures([summary], zone, frostLimitC, preferences),
              ...(core === null
                ? []
                : [
                    {
                      name: 'Core at dawn',
                      value: `${temperature(core.value, preferences)}, ${clock(core.at, zone, preferences)}`,
                    },
                  ]),
              { name: 'Read', value: share(summary.coverage, 1), note: 'of what was to be read' },
            ]}
          />
        </div>
      </Panel>
    </div>
  );
}

function Decisions({
  house,
  decisions,
  from,
  zone,
  preferences,
  many,
}: {
  house: string;
  decisions: OpenedDecision[];
  /** The night's first noon: what stood then was decided before. */
  from: number;
  zone: string;
  preferences: Preferences;
  many: boolean;
}) {
  if (decisions.length === 0)
    return (
      <p className="text-soft">Nothing was decided in this night: no worker ran, or the channel is newer.</p>
    );
  return (
    <ol
      className="max-h-96 overflow-y-auto border-t border-line"
      tabIndex={0}
      aria-label="Decisions of the night"
    >
      {decisions.map((decision) => (
        <li
          key={`${decision.at} ${decision.channel} ${decision.claim} ${decision.state}`}
          className="flex gap-3 border-b border-faint py-1.5"
        >
          <time
            dateTime={new Date(decision.at).toISOString()}
            className="w-20 shrink-0 font-mono text-[0.95rem] text-soft"
          >
            {decision.at < from ? 'at noon' : clock(decision.at, zone, preferences)}
          </time>
          <Link
            href={`/${house}/watch?why=${decision.key}&at=${new Date(Math.max(decision.at, from)).toISOString()}`}
            className="underline decoration-line underline-offset-4 hover:decoration-ink"
          >
            {many ? `${decision.channel}: ` : null}
            {decisionWords(decision.state, decision.claim)}
            <span className="sr-only">: why</span>
          </Link>
        </li>
      ))}
    </ol>
  );
}
