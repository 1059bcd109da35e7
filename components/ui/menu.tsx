'use client';
import * as Radix from 'radix-ui/dropdown-menu';
import type { ReactNode } from 'react';
import { Button } from './button';

export interface MenuItem {
  label: ReactNode;
  onSelect: () => void;
  disabled?: boolean;
}

/** A button with a list of actions under it. For navigation use links. */
export function Menu({ label, items }: { label: ReactNode; items: MenuItem[] }) {
  return (
    <Radix.Root>
      <Radix.Trigger asChild>
        <Button>
          {label}
          <svg aria-hidden="true" viewBox="0 0 10 6" className="w-2.5 fill-current">
            <path d="M0 0h10L5 6z" />
          </svg>
        </Button>
      </Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          align="end"
          sideOffset={4}
          className="z-50 min-w-48 rounded-lg border border-line bg-sheet p-1 text-ink shadow-lg"
        >
          {items.map((item, place) => (
            <Radix.Item
              key={place}
              disabled={item.disabled ?? false}
              onSelect={item.onSelect}
              className="flex min-h-11 cursor-pointer items-center rounded-md px-3 outline-none data-disabled:cursor-not-allowed data-disabled:text-soft data-highlighted:bg-faint data-highlighted:outline-2 data-highlighted:outline-ink"
            >
              {item.label}
            </Radix.Item>
          ))}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
