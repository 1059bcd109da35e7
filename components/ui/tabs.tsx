'use client';
import * as Radix from 'radix-ui/tabs';
import Link from 'next/link';
import type { ReactNode } from 'react';

const tab =
  'inline-flex min-h-11 items-center whitespace-nowrap border-b-2 px-1 font-semibold text-soft border-transparent hover:text-ink data-[state=active]:border-ink data-[state=active]:text-ink aria-[current=page]:border-ink aria-[current=page]:text-ink';
const row = 'flex gap-5 overflow-x-auto border-b border-line';

/** Parts of one page that need no address of their own. Arrow keys move between them. */
export function Tabs({
  label,
  tabs,
  initial,
}: {
  label: string;
  tabs: { value: string; label: ReactNode; content: ReactNode }[];
  initial?: string;
}) {
  return (
    <Radix.Root defaultValue={initial ?? tabs[0]?.value ?? ''}>
      <Radix.List aria-label={label} className={row}>
        {tabs.map((one) => (
          <Radix.Trigger key={one.value} value={one.value} className={tab}>
            {one.label}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map((one) => (
        <Radix.Content key={one.value} value={one.value} className="pt-4">
          {one.content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}

/** The same look for parts that have addresses, so that reload, share and back work. */
export function TabLinks({
  label,
  links,
}: {
  label: string;
  links: { href: string; label: ReactNode; current: boolean }[];
}) {
  return (
    <nav aria-label={label} className={row}>
      {links.map((one) => (
        <Link key={one.href} href={one.href} aria-current={one.current ? 'page' : undefined} className={tab}>
          {one.label}
        </Link>
      ))}
    </nav>
  );
}
