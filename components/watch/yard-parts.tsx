import { humidity, power } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import type { YardFacts, YardHeap } from './yard-facts';
import { Arrow, Fan, Pipe } from './yard-pipes';
import { loopWords } from './yard-words';

export const figure = 'font-mono font-semibold';
export const note = 'text-[11.5px] fill-soft';

/** A temperature in short, or a question mark. */
export type Short = (value: number | null) => string;

export function House({ facts, short }: { facts: YardFacts; short: Short }) {
  return (
    <g>
      <path
        d="M8 136V62L73 26L138 62V136z"
        className="fill-sheet stroke-ink"
        strokeWidth="2.2"
        strokeLinejoin="round"
      />
      <path d="M40 44V62M106 44V62M8 62H138" className="stroke-line" />
      {facts.vent === null ? null : (
        <path
          d={facts.vent.open ? 'M73 26L108 24' : 'M73 26L104 43'}
          className={facts.vent.open ? 'stroke-ember' : 'stroke-ink'}
          strokeWidth="3.4"
          strokeLinecap="round"
        />
      )}
      <text x="17" y="85" className={`fill-house text-[19px] ${figure}`}>
        {short(facts.house)}
      </text>
      <text x="17" y="99" className={note}>
        house
      </text>
      <text x="17" y="113" className={note}>
        {facts.humidity === null ? '' : humidity(facts.humidity)}
      </text>
      {facts.bench === null ? null : (
        <g>
          <path d="M78 104H132M82 104V114M128 104V114" className="stroke-ink" strokeWidth="1.6" />
          <text x="105" y="98" textAnchor="middle" className={`fill-house text-[13px] ${figure}`}>
            {short(facts.bench)}
          </text>
        </g>
      )}
      {facts.heater === null ? null : (
        <path
          d="M87 110l4 4 4-4 4 4 4-4 4 4 4-4 4 4 4-4"
          fill="none"
          className={facts.heater.on ? 'stroke-ember' : 'stroke-edge'}
          strokeWidth={facts.heater.on ? 2.6 : 1.3}
        />
      )}
    </g>
  );
}

export function Ground({
  ground,
  short,
  preferences,
}: {
  ground: NonNullable<YardFacts['ground']>;
  short: Short;
  preferences: Preferences;
}) {
  const runs = ground.loop?.runs ?? false;
  return (
    <g>
      <Pipe runs={runs} whole="M24 132V240H62V132" out="M24 136V240H43" back="M43 240H62V136" />
      <Fan x={24} y={127} runs={runs} />
      {runs ? <Arrow x={62} y={126} turn={-90} className="fill-ember" /> : null}
      <text x="74" y="240" className={`fill-base-tone text-[14px] ${figure}`}>
        {short(ground.temperature)}
      </text>
      <text x="74" y="254" className={note}>
        ground: {loopWords(ground.loop, preferences)}
      </text>
    </g>
  );
}

export function Heap({ heap, short }: { heap: YardHeap; short: Short }) {
  const runs = heap.loop?.runs ?? false;
  return (
    <g>
      <path d="M196 136C200 92 232 76 270 76S340 92 344 136L326 186H214z" className="fill-base-tone/25" />
      <path d="M214 138C218 106 242 94 270 94S322 106 326 138L312 172H228z" className="fill-base-tone/45" />
      <ellipse cx="270" cy="132" rx="36" ry="24" className="fill-core/50" />
      <path
        d="M192 128C196 84 230 68 270 68S344 84 348 128"
        fill="none"
        className="stroke-ink"
        strokeWidth="4.5"
        strokeLinecap="round"
      />
      <Pipe
        runs={runs}
        whole="M88 132V208H318V180H222V190H112V132"
        out="M88 136V208H318V196"
        back="M318 180H222V190H112V136"
      />
      <Fan x={88} y={127} runs={runs} />
      {runs ? (
        <>
          <Arrow x={200} y={208} turn={0} className="fill-outdoors" />
          <Arrow x={166} y={190} turn={180} className="fill-ember" />
          <Arrow x={112} y={127} turn={-90} className="fill-ember" />
        </>
      ) : null}
      <text
        x="270"
        y="130"
        textAnchor="middle"
        className={`text-[17px] ${figure} ${heap.underFloor ? 'fill-alarm' : 'fill-ink'}`}
      >
        {short(heap.core)}
      </text>
      <text x="270" y="144" textAnchor="middle" className="fill-ink text-[11px]">
        core
      </text>
      <text x="270" y="170" textAnchor="middle" className={`fill-ink text-[13px] ${figure}`}>
        {short(heap.base)}
      </text>
      <text x="270" y="58" textAnchor="middle" className={note}>
        {heap.name}
      </text>
      <text x="124" y="178" className={`text-[13px] ${runs ? 'fill-ember font-semibold' : 'fill-soft'}`}>
        {heapFlow(heap)}
      </text>
      <text x="324" y="227" textAnchor="end" className={note}>
        {runs ? `in at ${short(heap.loop?.intake ?? null)}, back at ${short(heap.loop?.back ?? null)}` : ''}
      </text>
    </g>
  );
}

/** In one or two words beside the pipe. */
function heapFlow({ loop }: YardHeap): string {
  if (loop === null) return '';
  if (loop.heatW !== null) return power(loop.heatW);
  return loop.runs ? 'air moves' : loop.isOrdered ? 'ordered on' : 'at rest';
}
