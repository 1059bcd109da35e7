'use client';
import { useEffect, useState } from 'react';
import { ButtonLink } from '@/components/ui/button';
import { ClockProvider } from '@/components/ui/clock';
import { keptBook, type KeptBook } from './book-facts';
import { OfflineForms } from './offline-forms';
import { Waiting } from './waiting';

interface Opened {
  book: KeptBook | null;
  house: string | null;
  heap: string | null;
  now: number;
}

/** Writing in the heap book without a line: the forms, and what waits. It reads nothing but what the device keeps. */
export function OfflineBook() {
  const [opened, setOpened] = useState<Opened | null>(null);
  useEffect(() => {
    const asked = new URLSearchParams(window.location.search);
    setOpened({
      book: keptBook(),
      house: asked.get('house'),
      heap: asked.get('heap'),
      now: Date.now(),
    });
  }, []);
  if (opened === null) return <h1 className="font-serif text-2xl">Heap book</h1>;
  const { book } = opened;
  const house = book?.houses.find((one) => one.slug === opened.house) ?? book?.houses[0];
  const heap = house?.heaps.find((one) => one.slug === opened.heap) ?? house?.heaps[0];
  if (book === null || house === undefined || heap === undefined)
    return (
      <div className="flex flex-col items-start gap-3">
        <h1 className="font-serif text-2xl">Heap book</h1>
        <p>
          There is no line, and this device keeps no book. Sign in and open the heap book once where there is
          one; after that it can be written in without.
        </p>
        <ButtonLink href="/" prefetch={false}>
          Try again
        </ButtonLink>
      </div>
    );
  return (
    <ClockProvider now={opened.now} rate={1}>
      <div className="flex flex-col gap-4">
        <div>
          <h1 className="font-serif text-2xl">Heap book of the {heap.name.toLowerCase()}</h1>
          <p className="text-soft">
            {house.name}, {book.person}. No line just now: what you write is kept on this device and sent
            later, once.
          </p>
        </div>
        <Waiting owner={book.owner} />
        <OfflineForms key={`${house.slug} ${heap.slug}`} book={book} house={house} heap={heap} />
        {/* a page load of its own: the book's figures come from the server */}
        <a
          href={`/${house.slug}/heap-book?heap=${heap.slug}`}
          className="flex min-h-11 items-center self-start underline underline-offset-4"
        >
          Back to the whole book
        </a>
      </div>
    </ClockProvider>
  );
}
