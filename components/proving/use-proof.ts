'use client';
import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useState } from 'react';
import { send, type Answer } from '@/components/ui/send';
import type { Proof, ProofPicture } from '@/lib/schema/proof';

const LOOK_EVERY_MS = 1000;

export interface ProofActs {
  proof: Proof | null;
  busy: boolean;
  /** What the server refused last, in words, and by field. */
  failure: { message: string; fields: Record<string, string> } | null;
  /** @returns whether it was done */
  act: (method: 'POST' | 'DELETE', path: string, body?: unknown) => Promise<boolean>;
  addPicture: (shows: ProofPicture['shows'], file: File) => Promise<void>;
  removePicture: (id: string) => Promise<void>;
  begin: (channel: string) => Promise<void>;
}

/** A proof as the server has it. While a run goes on, or its end is waited for, it is asked for each second. */
export function useProof(house: string, first: Proof | null): ProofActs {
  const router = useRouter();
  const [proof, setProof] = useState(first);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ProofActs['failure']>(null);
  const path = proof === null ? null : `/houses/${house}/proofs/${proof.id}`;
  const isWaited = proof !== null && proof.endedAt === null && proof.runs.some(isWaitedFor);

  const look = useCallback(async () => {
    if (path === null) return;
    const response = await fetch(`/api/v1${path}`).catch(() => null);
    if (response?.ok === true) setProof((await response.json()) as Proof);
  }, [path]);
  useEffect(() => {
    if (!isWaited) return;
    const timer = setInterval(() => void look(), LOOK_EVERY_MS);
    return () => clearInterval(timer);
  }, [isWaited, look]);

  const during = async <Value>(work: () => Promise<Answer<Value>>): Promise<Answer<Value>> => {
    setBusy(true);
    setFailure(null);
    const answer = await work();
    setBusy(false);
    if (!answer.ok) {
      const [first] = Object.values(answer.fields);
      setFailure({ message: first ?? answer.message, fields: answer.fields });
    }
    return answer;
  };

  const act: ProofActs['act'] = async (method, tail, body) => {
    if (path === null) return false;
    const answer = await during(() => send<Proof>(method, `${path}/${tail}`, body));
    if (!answer.ok) return false;
    setProof(answer.value);
    if (answer.value.endedAt !== null) router.refresh();
    return true;
  };

  return {
    ...{ proof, busy, failure, act },
    addPicture: async (shows, file) => {
      if (path === null) return;
      const answer = await during(() => sendPicture(`${path}/photographs?shows=${shows}`, file));
      if (answer.ok) await look();
    },
    removePicture: async (id) => {
      const answer = await during(() => send('DELETE', `/houses/${house}/proof-photographs/${id}`));
      if (answer.ok) await look();
    },
    begin: async (channel) => {
      const answer = await during(() => send<Proof>('POST', `/houses/${house}/proofs`, { channel }));
      if (answer.ok) setProof(answer.value);
    },
  };
}

/** A run that goes on, one whose end is not told yet, and a node that has not come back. */
function isWaitedFor(run: Proof['runs'][number]): boolean {
  if (!run.isOver) return true;
  return run.kind === 'unplug' ? run.fell === null : run.startedAt !== null && run.endedAt === null;
}

async function sendPicture(path: string, file: File): Promise<Answer<unknown>> {
  const response = await fetch(`/api/v1${path}`, {
    method: 'POST',
    headers: { 'content-type': file.type },
    body: file,
  }).catch(() => null);
  if (response?.ok === true) return { ok: true, value: null };
  const problem = (await response?.json().catch(() => null)) as {
    detail?: string;
    errors?: { message: string }[];
  } | null;
  const message =
    problem?.errors?.[0]?.message ??
    problem?.detail ??
    'The server does not answer; the picture was not kept.';
  return { ok: false, status: response?.status ?? 0, message, fields: {} };
}
