'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { OwnMaterialForm } from './own-material-form';

/** The holding's own materials: one more, or one taken out of use. Entries name theirs in words and stay as they are. */
export function OwnMaterials({ own }: { own: readonly { id: string; name: string }[] }) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  async function remove({ id, name }: { id: string; name: string }) {
    const answer = await send('DELETE', `/materials/${id}`);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    say(`${name} is out of use.`);
    router.refresh();
  }
  return (
    <section aria-label="Your own materials" className="flex flex-col gap-2">
      <ul className="divide-y divide-faint empty:hidden">
        {own.map((one) => (
          <li key={one.id} className="flex items-center justify-between gap-2 py-1">
            {one.name}
            <Button onClick={() => void remove(one)}>
              Out of use<span className="sr-only"> {one.name}</span>
            </Button>
          </li>
        ))}
      </ul>
      {isOpen ? (
        <OwnMaterialForm onClose={() => setOpen(false)} />
      ) : (
        <Button className="self-start" onClick={() => setOpen(true)}>
          A material of your own …
        </Button>
      )}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </section>
  );
}
