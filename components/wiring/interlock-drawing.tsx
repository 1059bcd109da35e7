import { classes } from '@/components/ui/classes';
import type { Channel } from '@/lib/schema/yard-view';
import { interlockLayout, type Lock } from './interlock-layout';

const LONGEST = 24;
const short = (label: string) => (label.length > LONGEST ? `${label.slice(0, LONGEST - 1)}…` : label);

/**
 * Channels in a column; a dashed arc with a bar joins two that never run together, a plain one with an arrow leads to what a
 * channel needs. The sentences beside it say the same.
 */
export function InterlockDrawing({
  channels,
  locks,
}: {
  channels: readonly Pick<Channel, 'key' | 'number' | 'label'>[];
  locks: readonly Lock[];
}) {
  const named = new Set(locks.flatMap((one) => [one.channel, one.other]));
  const shown = channels.filter((one) => named.has(one.key));
  const { rows, arcs, width, height } = interlockLayout(
    shown.map((one) => one.key),
    locks,
  );
  if (arcs.length === 0) return null;
  return (
    <svg
      role="img"
      aria-label="The interlocks as a drawing; the sentences beside it say the same"
      viewBox={`0 0 ${width} ${height}`}
      className="w-full max-w-sm"
    >
      {shown.map((channel, place) => (
        <g key={channel.key} transform={`translate(0 ${rows[place]?.y ?? 0})`}>
          <circle cx="14" r="12" className="fill-sheet stroke-ink" strokeWidth="1.5" />
          <text x="14" dy="0.35em" textAnchor="middle" className="fill-ink font-mono text-[12px]">
            {channel.number}
          </text>
          <text x="34" dy="0.35em" className="fill-ink text-[13px]">
            {short(channel.label)}
          </text>
          <circle cx="228" r="2.5" className="fill-ink" />
        </g>
      ))}
      {arcs.map((arc, place) => (
        <g
          key={place}
          data-lock={arc.kind}
          className={classes('fill-none', arc.isDraft === true ? 'stroke-ember' : 'stroke-ink')}
          strokeWidth={arc.isDraft === true ? 2.4 : 1.6}
        >
          <path d={arc.path} strokeDasharray={arc.kind === 'never-with' ? '5 4' : undefined} />
          {arc.kind === 'never-with' ? (
            <path d={`M${arc.middle.x - 7} ${arc.middle.y}h14`} strokeWidth="3" />
          ) : (
            <path d={`M${arc.end.x + 9} ${arc.end.y - 6}L${arc.end.x + 1} ${arc.end.y}l8 6`} />
          )}
        </g>
      ))}
    </svg>
  );
}
