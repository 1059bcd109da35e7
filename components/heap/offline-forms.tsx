'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { say } from '@/components/ui/toast';
import { HEAP_KINDS, kindWord, type HeapKind } from '@/lib/wording/heap';
import type { BookHouse, KeptBook } from './book-facts';
import { Cautions } from './cautions';
import { EntryForm } from './entry-form';
import { RoundForm } from './round-form';

/** The same forms as in the book, one after another on the page: no dialog that would have to be fetched. */
export function OfflineForms({
  book,
  house,
  heap,
}: {
  book: KeptBook;
  house: BookHouse;
  heap: BookHouse['heaps'][number];
}) {
  const [open, setOpen] = useState<HeapKind | 'probed' | null>(null);
  const target = { house: house.slug, heap: heap.slug, zone: house.zone, owner: book.owner };
  const done = (said: string) => {
    say(said);
    setOpen(null);
  };
  if (open === null)
    return (
      <div className="grid grid-cols-2 gap-2">
        <Button kind="primary" className="min-h-14" onClick={() => setOpen('probed')}>
          Probe round
        </Button>
        {HEAP_KINDS.map(({ kind, label }) => (
          <Button key={kind} className="min-h-14" onClick={() => setOpen(kind)}>
            {label}
          </Button>
        ))}
      </div>
    );
  return (
    <section className="flex flex-col gap-4 rounded-lg border border-line bg-sheet p-4">
      <h2 className="font-serif text-xl font-semibold">
        {open === 'probed' ? 'Probe round' : kindWord(open)}
      </h2>
      <Cautions kind={open} />
      {open === 'probed' ? (
        <RoundForm
          {...target}
          section={heap.section}
          preferences={book.preferences}
          onDone={done}
          onLeave={() => setOpen(null)}
        />
      ) : (
        <EntryForm {...target} kind={open} onDone={done} onLeave={() => setOpen(null)} />
      )}
    </section>
  );
}
