'use client';
import Link, { useLinkStatus } from 'next/link';
import { usePathname } from 'next/navigation';
import type { ReactNode } from 'react';
import { classes } from '@/components/ui/classes';
import { badgeOf, hrefInHouse, hrefOf, SECTIONS, whereIs, type Section, type ShellHouse } from './sections';

/**
 * Says that a page is being fetched, at the link that was pressed. A loading page would stand in its way twice: it puts
 * the content behind a script, and it answers 200 before anybody looked whether the thing is there.
 */
function Opening() {
  const { pending } = useLinkStatus();
  return (
    <>
      <span
        aria-hidden="true"
        className={classes(
          'absolute inset-x-3 bottom-1.5 h-0.5 rounded-full bg-current',
          pending ? 'motion-safe:animate-pulse' : 'invisible',
        )}
      />
      {pending ? (
        <span role="status" className="sr-only">
          Opening
        </span>
      ) : null}
    </>
  );
}

function Entry({
  section,
  house,
  current,
  className,
}: {
  section: Section;
  house: ShellHouse | null;
  current: boolean;
  className: string;
}) {
  const href = hrefOf(section, house);
  const badge = badgeOf(section, house);
  if (href === null) return null;
  return (
    <Link href={href} aria-current={current ? 'page' : undefined} className={className}>
      {section.label}
      <Opening />
      {badge === null ? null : (
        <span
          className={classes(
            'tabular-nums',
            section.key === 'alarms' && !current && 'font-semibold text-alarm',
          )}
        >
          <span aria-hidden="true">{badge.count}</span>
          <span className="sr-only">, {badge.words}</span>
        </span>
      )}
    </Link>
  );
}

const line =
  'relative flex min-h-11 items-center justify-between rounded-md px-3 text-soft hover:bg-faint hover:text-ink aria-[current=page]:bg-ink aria-[current=page]:text-paper';

/** Down the left side of a wide screen. */
export function SideLinks({ houses }: { houses: ShellHouse[] }) {
  const { house, section } = whereIs(usePathname(), houses);
  return (
    <nav aria-label="Pages" className="flex flex-col gap-0.5">
      {SECTIONS.map((one) => (
        <Entry key={one.key} section={one} house={house} current={one.key === section} className={line} />
      ))}
    </nav>
  );
}

/** The house that is shown; with several, a list to go to the same page of another. */
export function HouseSwitch({ houses }: { houses: ShellHouse[] }) {
  const path = usePathname();
  const { house, section } = whereIs(path, houses);
  if (house === null) return null;
  if (houses.length === 1) return <p className="text-soft">{house.name}</p>;
  return (
    // closed again by the key when a page is reached
    <details key={path} className="group relative">
      <summary className="flex min-h-11 cursor-pointer list-none items-center gap-2 text-soft hover:text-ink [&::-webkit-details-marker]:hidden">
        <span className="sr-only">House: </span>
        {house.name}
        <svg aria-hidden="true" viewBox="0 0 10 6" className="w-2.5 fill-current group-open:rotate-180">
          <path d="M0 0h10L5 6z" />
        </svg>
      </summary>
      <ul className="absolute z-30 w-56 rounded-lg border border-line bg-sheet p-1 shadow-lg max-lg:right-0">
        {houses.map((one) => (
          <li key={one.slug}>
            <Link
              href={hrefInHouse(one, section)}
              aria-current={one === house ? 'true' : undefined}
              className={classes(line, 'aria-[current=true]:font-semibold aria-[current=true]:text-ink')}
            >
              {one.name}
              {one.alarms === 0 ? null : (
                <span className="font-semibold text-alarm">
                  {one.alarms}
                  <span className="sr-only"> open alarms</span>
                </span>
              )}
            </Link>
          </li>
        ))}
      </ul>
    </details>
  );
}

const barItem =
  'relative flex min-h-14 flex-1 items-center justify-center gap-1 px-1 text-center text-[0.85rem] text-soft aria-[current=page]:font-semibold aria-[current=page]:text-ink';

/** At the foot of a phone, where a thumb reaches. `more` opens over it and holds the rest. */
export function FootBar({ houses, more }: { houses: ShellHouse[]; more: ReactNode }) {
  const path = usePathname();
  const { house, section } = whereIs(path, houses);
  const isUnderMore = SECTIONS.some((one) => one.key === section && !one.onBar);
  return (
    <nav
      aria-label="Pages"
      className="not-on-paper fixed inset-x-0 bottom-0 z-30 flex border-t border-line bg-sheet pb-[env(safe-area-inset-bottom)] lg:hidden"
    >
      {SECTIONS.filter((one) => one.onBar).map((one) => (
        <Entry key={one.key} section={one} house={house} current={one.key === section} className={barItem} />
      ))}
      <details key={path} className="flex flex-1">
        <summary
          className={classes(
            barItem,
            'w-full cursor-pointer list-none [&::-webkit-details-marker]:hidden',
            isUnderMore && 'font-semibold text-ink',
          )}
        >
          More
        </summary>
        <div className="absolute inset-x-0 bottom-full max-h-[75dvh] overflow-y-auto border-t border-line bg-sheet p-4">
          <div className="flex flex-col gap-0.5 pb-3">
            {SECTIONS.filter((one) => !one.onBar).map((one) => (
              <Entry
                key={one.key}
                section={one}
                house={house}
                current={one.key === section}
                className={line}
              />
            ))}
          </div>
          {more}
        </div>
      </details>
    </nav>
  );
}
