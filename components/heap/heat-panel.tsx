import { Figures, Panel } from '@/components/ui/panel';
import type { HeatRecord } from '@/lib/analysis/hygiene';
import type { Preferences } from '@/lib/units/preferences';
import { heatRows, ruleRows } from '@/lib/wording/heap-heat';

/** Time at temperature: what the core's probe measured, beside what the rules ask. Never an approval. */
export function HeatPanel({
  heat,
  zone,
  preferences,
}: {
  heat: HeatRecord | null;
  zone: string;
  preferences: Preferences;
}) {
  return (
    <Panel title="Time at temperature">
      <p className="mb-2 text-[0.9rem] text-soft">
        A record of what was measured at the core’s probe, where it was measured; not an approval. The rules
        ask it of the whole heap, and edges are colder.
      </p>
      {heat === null ? (
        <p className="text-soft">The core has no readings yet.</p>
      ) : (
        <>
          <Figures rows={heatRows(heat, zone, preferences)} />
          <details className="mt-1">
            <summary className="flex min-h-11 cursor-pointer items-center text-[0.9rem] text-soft underline underline-offset-4">
              Beside the published rules
            </summary>
            <ul className="flex flex-col gap-3 border-t border-line pt-2">
              {ruleRows(heat, preferences).map((rule) => (
                <li key={rule.name}>
                  <p className="flex flex-wrap justify-between gap-x-4">
                    <strong className="font-semibold">{rule.name}</strong>
                    <span className="font-mono text-[0.95rem]">{rule.measured}</span>
                  </p>
                  <p className="text-[0.9rem] text-soft">{rule.note}</p>
                </li>
              ))}
            </ul>
            <p className="mt-2 text-[0.9rem] text-soft">
              Spells are unbroken and rounded down; a silence of the probe of over a quarter of an hour ends
              one, since a gap is no proof of heat. 130 °F is 54.4 °C, and is under 55.
            </p>
          </details>
        </>
      )}
    </Panel>
  );
}
