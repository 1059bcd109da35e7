import { classes } from '@/components/ui/classes';

/** A closed pipe in section. Air is drawn moving only while the fan is reported on, and in the way it moves. */
export function Pipe({
  whole,
  out,
  back,
  runs,
}: {
  whole: string;
  out: string;
  back: string;
  runs: boolean;
}) {
  return (
    <g fill="none" strokeLinejoin="round">
      <path d={whole} className="stroke-edge" strokeWidth="10" />
      <path d={whole} className="stroke-sheet" strokeWidth="7.5" />
      {runs ? (
        <>
          <path d={out} className="air-moves stroke-outdoors" strokeWidth="3" strokeDasharray="7 5" />
          <path d={back} className="air-moves stroke-ember" strokeWidth="3.5" strokeDasharray="7 5" />
        </>
      ) : null}
    </g>
  );
}

/** Blows into the pipe, so that a leak goes outwards. */
export function Fan({ x, y, runs }: { x: number; y: number; runs: boolean }) {
  return (
    <g className={runs ? 'fill-ember stroke-ember' : 'fill-soft stroke-edge'}>
      <circle cx={x} cy={y} r="8" className="fill-sheet" strokeWidth="1.4" />
      {[0, 120, 240].map((turn) => (
        <path
          key={turn}
          d={`M${x} ${y}c-3-1-4.500-4-3-6.500c2.500 0 4 3 3 6.500z`}
          transform={`rotate(${turn} ${x} ${y})`}
          stroke="none"
        />
      ))}
    </g>
  );
}

export function Arrow({ x, y, turn, className }: { x: number; y: number; turn: number; className: string }) {
  return (
    <path
      d="M-4-5L5 0L-4 5z"
      transform={`translate(${x} ${y}) rotate(${turn})`}
      className={classes(className)}
    />
  );
}
