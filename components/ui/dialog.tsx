'use client';
import * as Radix from 'radix-ui/dialog';
import { useRef, type ReactNode } from 'react';
import { Button } from './button';
import type { ButtonKind } from './button-look';

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  /** What will happen, or what this is: read out when the dialog opens. */
  description?: ReactNode;
  children?: ReactNode;
  /** Buttons at the foot, the safe one first. */
  actions?: ReactNode;
  /** A sheet takes the phone's foot or the desktop's right side: for reading, not for asking. */
  as?: 'dialog' | 'sheet';
}

const places = {
  dialog:
    'inset-x-3 bottom-3 max-h-[90dvh] sm:inset-x-auto sm:bottom-auto sm:left-1/2 sm:top-[12vh] sm:max-h-[76vh] sm:w-[30rem] sm:-translate-x-1/2 rounded-lg',
  sheet:
    'inset-x-0 bottom-0 max-h-[92dvh] rounded-t-lg sm:inset-x-auto sm:inset-y-0 sm:right-0 sm:max-h-none sm:w-[30rem] sm:rounded-none',
};

/** Focus is held inside, Escape and the shade close it, focus returns to where it came from. */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  children,
  actions,
  as = 'dialog',
}: DialogProps) {
  // Radix gives focus back to its own trigger, which our dialogs do without: what opened them is remembered here
  const opener = useRef<Element | null>(null);
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-shade" />
        <Radix.Content
          // without a description Radix warns unless this is said outright
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
          onOpenAutoFocus={() => {
            opener.current = document.activeElement;
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            if (opener.current instanceof HTMLElement) opener.current.focus();
          }}
          className={`fixed z-50 flex flex-col overflow-y-auto border border-line bg-sheet p-5 text-ink outline-none ${places[as]}`}
        >
          <div className="flex items-start justify-between gap-3">
            <Radix.Title className="pt-1.5 font-serif text-xl font-semibold">{title}</Radix.Title>
            <Radix.Close asChild>
              <Button kind="quiet" className="-mr-3 -mt-1 no-underline" aria-label="Close">
                <svg
                  aria-hidden="true"
                  viewBox="0 0 16 16"
                  className="size-4 stroke-current"
                  fill="none"
                  strokeWidth="2"
                >
                  <path d="M3 3l10 10M13 3L3 13" />
                </svg>
              </Button>
            </Radix.Close>
          </div>
          {description === undefined ? null : (
            <Radix.Description asChild>
              <div className="mt-1 text-soft">{description}</div>
            </Radix.Description>
          )}
          {children === undefined ? null : <div className="mt-4 flex flex-col gap-4">{children}</div>}
          {actions === undefined ? null : <div className="mt-5 flex flex-wrap gap-2">{actions}</div>}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

/** Asks before something that moves a relay or cannot be taken back; `description` says what will happen. */
export function ConfirmDialog({
  confirm,
  kind = 'primary',
  busy = false,
  error,
  onConfirm,
  ...rest
}: Omit<DialogProps, 'actions' | 'as'> & {
  confirm: string;
  kind?: ButtonKind;
  busy?: boolean;
  error?: string | undefined;
  onConfirm: () => void;
}) {
  return (
    <Dialog
      {...rest}
      actions={
        <>
          <Button kind={kind} busy={busy} onClick={onConfirm}>
            {confirm}
          </Button>
          <Button onClick={() => rest.onOpenChange(false)}>Leave as it is</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {error}
          </p>
        </>
      }
    />
  );
}
