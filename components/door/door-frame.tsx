import type { ReactNode } from 'react';

/** The room before the holding: one narrow sheet, readable before any script. */
export function DoorFrame({ children }: { children: ReactNode }) {
  return (
    <main className="mx-auto flex min-h-dvh w-full max-w-md flex-col justify-center gap-5 px-4 py-10">
      <p className="font-serif text-xl">Middenward</p>
      {children}
    </main>
  );
}

export function DoorSheet({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="rounded-lg border border-line bg-sheet p-5">
      <h1 className="mb-3 font-serif text-2xl leading-snug">{title}</h1>
      {children}
    </div>
  );
}
