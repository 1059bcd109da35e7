'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextField } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import type { RoleFacts } from '@/lib/wording/people';
import { RoleChoice } from './role-choice';

/** Makes a key for a program and shows it this once. */
export function NewKey({ roles }: { roles: RoleFacts[] }) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [name, setName] = useState('');
  const [role, setRole] = useState(roles[1]?.role ?? roles[0]?.role ?? '');
  const [fields, setFields] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [made, setMade] = useState<string | null>(null);

  function close() {
    setOpen(false);
    setMade(null);
    setName('');
    setFailure(null);
    setFields({});
  }

  async function make() {
    const body = { name, role };
    // with zod inside, so not before it is asked for
    const { ApiKeyCreate } = await import('@/lib/schema/people');
    const parsed = ApiKeyCreate.safeParse(body);
    setFailure(null);
    setFields(Object.fromEntries(parsed.error?.issues.map((one) => [one.path.join('.'), one.message]) ?? []));
    if (!parsed.success) return;
    setBusy(true);
    const answer = await send<{ key: string }>('POST', '/api-keys', body);
    setBusy(false);
    if (!answer.ok) {
      setFields(answer.fields);
      return setFailure(answer.message);
    }
    setMade(answer.value.key);
    router.refresh();
  }

  return (
    <>
      <Button onClick={() => setOpen(true)} aria-haspopup="dialog">
        New key…
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={(open) => (open ? setOpen(true) : close())}
        title={made === null ? 'A key for a program' : `The key ${name}`}
        description={
          made === null
            ? 'It is sent in the header x-api-key and may do what its role may.'
            : 'Copy it now: it is not kept and cannot be shown again.'
        }
        actions={made === null ? undefined : <Button onClick={close}>I have it</Button>}
      >
        {made === null ? (
          <form
            noValidate
            className="flex flex-col gap-4"
            onSubmit={(event) => {
              event.preventDefault();
              void make();
            }}
          >
            <TextField
              label="Name"
              hint="Of the program, so that the log tells who acted."
              value={name}
              error={fields['name']}
              onChange={(event) => setName(event.target.value)}
            />
            <RoleChoice roles={roles} value={role} error={fields['role']} onChange={setRole} />
            <div className="flex flex-wrap gap-2">
              <Button type="submit" kind="primary" busy={isBusy}>
                Make the key
              </Button>
              <Button onClick={close}>Leave as it is</Button>
              <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
                {failure}
              </p>
            </div>
          </form>
        ) : (
          <code
            tabIndex={0}
            className="block rounded-md border border-edge bg-field p-3 font-mono break-all select-all"
          >
            {made}
          </code>
        )}
      </Dialog>
    </>
  );
}
