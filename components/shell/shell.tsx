import Link from 'next/link';
import type { ReactNode } from 'react';
import { ClockProvider } from '@/components/ui/clock';
import { Toasts } from '@/components/ui/toast';
import type { Preferences } from '@/lib/units/preferences';
import { FootBar, HouseSwitch, SideLinks } from './nav';
import { Reading, type ThemeChoice } from './reading';
import type { ShellHouse } from './sections';
import { SignOut } from './sign-out';

export interface ShellData {
  person: string;
  holding: string;
  houses: ShellHouse[];
  preferences: Preferences;
  theme: ThemeChoice;
  now: number;
  rate: number;
}

function Mark() {
  return (
    <span className="flex items-center gap-2 font-serif text-[1.35rem] font-semibold">
      <svg aria-hidden="true" viewBox="0 0 24 24" className="size-6">
        <path d="M2 19c1.5-7 5.5-11 10-11s8.500 4 10 11z" className="fill-base-tone" />
        <path d="M7 19c1-3.600 2.900-5.600 5-5.600s4 2 5 5.600z" className="fill-ember" />
        <path d="M1 19.500h22" className="stroke-ink" strokeWidth="1.600" strokeLinecap="round" />
      </svg>
      Middenward
    </span>
  );
}

function Yours({ data }: { data: ShellData }) {
  return (
    <div className="flex flex-col items-start gap-3">
      <Reading preferences={data.preferences} theme={data.theme} />
      <p className="text-[0.9rem] text-soft">Signed in as {data.person}</p>
      <Link href="/account" className="flex min-h-11 items-center underline underline-offset-4">
        Your account and password
      </Link>
      <SignOut />
    </div>
  );
}

/** What stands round every page behind the door: where you are, where you can go, how you read. */
export function Shell({ data, children }: { data: ShellData; children: ReactNode }) {
  return (
    <ClockProvider now={data.now} rate={data.rate}>
      <a
        href="#page"
        className="absolute -top-20 left-3 z-50 rounded-md bg-ink px-4 py-3 text-paper focus:top-3"
      >
        Skip to the page
      </a>
      <div className="lg:grid lg:grid-cols-[12.5rem_minmax(0,1fr)]">
        <header className="not-on-paper sticky top-0 hidden h-dvh flex-col gap-5 overflow-y-auto border-r border-line p-4 lg:flex">
          <div>
            <Mark />
            <p className="mt-1 text-[0.95rem] text-soft">{data.holding}</p>
            <HouseSwitch houses={data.houses} />
          </div>
          <SideLinks houses={data.houses} />
          <details className="mt-auto">
            <summary className="flex min-h-11 cursor-pointer items-center text-[0.9rem] text-soft hover:text-ink">
              {data.person}
            </summary>
            <Yours data={data} />
          </details>
        </header>
        <header className="not-on-paper flex min-h-14 items-center justify-between gap-3 px-4 lg:hidden">
          <Mark />
          <HouseSwitch houses={data.houses} />
        </header>
        <main
          id="page"
          tabIndex={-1}
          className="mx-auto w-full max-w-[76rem] px-4 pb-28 outline-none lg:px-7 lg:pt-6 lg:pb-10"
        >
          {children}
        </main>
      </div>
      <FootBar
        houses={data.houses}
        more={
          <>
            <p className="pb-3 text-[0.9rem] text-soft">{data.holding}</p>
            <Yours data={data} />
          </>
        }
      />
      <Toasts />
    </ClockProvider>
  );
}
