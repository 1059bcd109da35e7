import type { Metadata } from 'next';
import { OfflineBook } from '@/components/heap/offline-book';
import { Toasts } from '@/components/ui/toast';

export const metadata: Metadata = { title: 'Heap book without a line', robots: { index: false } };

/** The same for everybody: what it shows of a holding comes from the device of whoever wrote there last. */
export default function OfflineBookPage() {
  return (
    <main className="mx-auto w-full max-w-[34rem] px-4 pt-4 pb-16">
      <OfflineBook />
      <Toasts />
    </main>
  );
}
