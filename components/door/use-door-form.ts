'use client';
import { useState, type SubmitEvent } from 'react';
import { sendAuth, type Refusal } from './send-auth';

/** One form of the door: what is sent, what came back, and whether it is under way. Nothing typed is lost. */
export function useDoorForm(
  path: string,
  bodyOf: (form: FormData) => object,
  whenDone: (form: FormData) => void,
) {
  const [refusal, setRefusal] = useState<Refusal | null>(null);
  const [busy, setBusy] = useState(false);

  async function send(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    const refused = await sendAuth(path, bodyOf(form));
    setRefusal(refused);
    setBusy(false);
    if (refused === null) whenDone(form);
  }
  return { refusal, busy, onSubmit: (event: SubmitEvent<HTMLFormElement>) => void send(event) };
}

export function text(form: FormData, name: string): string {
  const value = form.get(name);
  return typeof value === 'string' ? value : '';
}
