'use client';
import { useCallback, useState } from 'react';

const NOT_FETCHED =
  'The server did not send what this button opens, so nothing was changed. Press it again when you are on line; if it still does not open, load the page anew.';

/**
 * What a press opens, with a script that is fetched by the press: the many who never press do not wait for it. The button
 * stays enabled meanwhile, so that focus is still on it when a dialog opens and comes back to it.
 * @param fetchPart an `import()`, written down in its place so that the build sees it
 */
export function usePressed<Part>(fetchPart: () => Promise<Part>) {
  const [part, setPart] = useState<Part | null>(null);
  const [isOpen, setOpen] = useState(false);
  const [isComing, setComing] = useState(false);
  const [failure, setFailure] = useState<string>();

  const open = useCallback(async () => {
    if (isComing) return;
    if (part === null) {
      setFailure(undefined);
      setComing(true);
      const came = await fetchPart().catch(() => null);
      setComing(false);
      if (came === null) return setFailure(NOT_FETCHED);
      setPart(came);
    }
    setOpen(true);
  }, [fetchPart, isComing, part]);

  return {
    /** Null until it was fetched. From then on it stays, opened and closed: a dialog that goes gives focus back. */
    part,
    isOpen,
    setOpen,
    /** In words, why a press opened nothing. */
    failure,
    /** Of the button. */
    press: { onClick: () => void open(), 'aria-busy': isComing || undefined },
  };
}
