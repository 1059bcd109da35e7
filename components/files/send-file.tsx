'use client';
import { useRouter } from 'next/navigation';
import { send } from '@/components/ui/send';
import { type Import, LARGEST_FILE } from '@/lib/schema/import';
import { SendInPieces } from './send-in-pieces';

/** A logger's file that is to come in. */
export function SendFile({ house, unfinished }: { house: string; unfinished: Import | null }) {
  const router = useRouter();
  const imports = `/houses/${house}/imports`;
  const show = (search: string) => {
    router.push(`/${house}/files${search}`);
    router.refresh();
  };
  return (
    <div className="flex flex-col items-start gap-4">
      <p className="max-w-prose text-soft">
        A table of any make, as CSV or text: one column with the time, others with values. You see what is
        understood of it before anything is written, and can take it back whole afterwards.
      </p>
      <SendInPieces
        field={{
          label: 'File',
          hint: 'Up to 200 MiB. Readings of the last day are left out: those come from the nodes alone.',
          accept: '.csv,.txt,.tsv,.asc,.dat,text/csv,text/plain',
        }}
        most={{ bytes: LARGEST_FILE, words: 'at most 200 MiB come in at once. Split it by seasons.' }}
        unfinished={unfinished}
        begin={(file) => send<Import>('POST', imports, file)}
        pathOf={(one) => `${imports}/${one.id}`}
        onSent={(one) => show(`?import=${one.id}`)}
        onDrop={async (one) => {
          await send('DELETE', `${imports}/${one.id}`);
          show('');
        }}
      />
    </div>
  );
}
