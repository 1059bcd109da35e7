'use client';
import { memo, useMemo, type MouseEvent } from 'react';
import { classes } from '@/components/ui/classes';
import { nightLabel } from '@/lib/units/time';
import type { NightLine } from './night-line';
import { NightStrip, QUARTERS } from './night-strip';
import { useGrowing, useOpening } from './use-night-rows';

/** The rows of the table of nights. @param to the address of an opened night, but for its name */
export function NightRows({
  first,
  later,
  count,
  to,
  opened,
  hasHeat,
}: {
  first: NightLine[];
  /** JSON of the lines after the first ones. */
  later: string;
  count: number;
  to: string;
  opened: string | null;
  hasHeat: boolean;
}) {
  const many = useGrowing(count);
  const onOpen = useOpening();
  const hasGrown = many > first.length;
  const rest = useMemo(() => (hasGrown ? (JSON.parse(later) as NightLine[]) : []), [later, hasGrown]);
  const left = count - many;
  return (
    <>
      {[...first, ...rest.slice(0, many - first.length)].map((line) => (
        <NightRow
          key={line.night}
          line={line}
          href={`${to}${line.night}#night`}
          isOpen={line.night === opened}
          hasHeat={hasHeat}
          onOpen={onOpen}
        />
      ))}
      {left === 0 ? null : (
        <tr aria-hidden="true" style={{ height: `${left * 1.55}rem` }}>
          <td colSpan={7} />
        </tr>
      )}
    </>
  );
}

const cell = 'whitespace-nowrap px-2 py-0 text-right font-mono text-[0.9rem]';
const unknown = <span className="font-sans text-[0.8rem] text-soft">not known</span>;

const NightRow = memo(function NightRow({
  line,
  href,
  isOpen,
  hasHeat,
  onOpen,
}: {
  line: NightLine;
  href: string;
  isOpen: boolean;
  hasHeat: boolean;
  onOpen: (event: MouseEvent<HTMLAnchorElement>) => void;
}) {
  return (
    <tr className={classes('border-b border-faint hover:bg-faint', isOpen && 'bg-faint')}>
      <th scope="row" className="whitespace-nowrap px-2 py-0 text-left font-mono text-[0.9rem] font-normal">
        <a
          href={href}
          onClick={onOpen}
          aria-current={isOpen ? 'true' : undefined}
          className="flex min-h-6 items-center underline decoration-line underline-offset-4 hover:decoration-ink aria-[current=true]:font-semibold"
        >
          {nightLabel(line.night)}
          {line.isThin === true ? <span aria-hidden="true">*</span> : null}
          {line.note === undefined ? null : <span className="sr-only"> ({line.note})</span>}
        </a>
      </th>
      <td className={classes('w-1/2 min-w-32 px-0 py-0.5', QUARTERS)}>
        <span className="flex flex-col gap-0.5">
          {line.strips.map((packed, place) => (
            <NightStrip key={place} packed={packed} length={line.length} />
          ))}
        </span>
      </td>
      <td className={cell}>{line.ran}</td>
      {hasHeat ? <td className={cell}>{line.heat ?? unknown}</td> : null}
      <td className={classes(cell, 'max-sm:hidden')}>{line.starts}</td>
      <td className={classes(cell, 'max-sm:hidden', line.isCold === true && 'font-semibold text-alarm')}>
        {line.lowest ?? unknown}
        {line.isCold === true ? <span className="sr-only"> under the frost limit</span> : null}
      </td>
      <td className={classes(cell, 'text-outdoors max-sm:hidden')}>{line.outdoors ?? unknown}</td>
    </tr>
  );
});
