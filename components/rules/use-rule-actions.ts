'use client';
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import type { FieldPath, UseFormReturn } from 'react-hook-form';
import { send, type Answer } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { RuleBody } from '@/lib/control/rule-body';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import { fieldOfPath } from './field-paths';
import type { RuleForm } from './form-values';

/** Save the draft, put it into force, go back, and what is done to the rule as a whole. A refusal stands at its field; what was typed stays. */
export function useRuleActions({
  rule,
  form,
  draftNumber,
  bodyNow,
  valuesOf,
  onGo,
}: {
  rule: RuleWithVersions;
  form: UseFormReturn<RuleForm>;
  draftNumber: number;
  bodyNow: () => Promise<RuleBody | null>;
  valuesOf: (body: RuleBody) => Promise<RuleForm>;
  /** Brings the focus to the field of a path. */
  onGo: (path: string) => void;
}) {
  const router = useRouter();
  // counted here, since the page is read anew only after the answer; another's change meanwhile is then told as one
  const revision = useRef(rule.revision);
  const [failure, setFailure] = useState<string | null>(null);
  const [going, setGoing] = useState<{ busy: number | null; failure: string | null }>({
    busy: null,
    failure: null,
  });

  async function save(): Promise<Answer<unknown>> {
    setFailure(null);
    const body = await bodyNow();
    if (body === null)
      return { ok: false, status: 0, fields: {}, message: 'Some fields need another look first.' };
    const answer = await send('PUT', `/rules/${rule.id}/draft`, body, `"${revision.current}"`);
    if (answer.ok) {
      revision.current += 1;
      form.reset(form.getValues());
      router.refresh();
      return answer;
    }
    for (const [path, message] of Object.entries(answer.fields))
      form.setError(fieldOfPath(path) as FieldPath<RuleForm>, { type: 'said', message });
    const [first] = Object.keys(answer.fields);
    if (first !== undefined) onGo(first);
    setFailure(
      answer.status === 412
        ? 'Somebody saved this rule since you opened it. Copy what you need, then reload the page to see theirs.'
        : answer.message,
    );
    return answer;
  }

  async function force(why: string, typed: string | null): Promise<Answer<unknown>> {
    if (form.formState.isDirty || rule.draft === null) {
      const saved = await save();
      if (!saved.ok) return saved;
    }
    const consent = typed === null ? {} : { acceptUnproved: true, consent: typed };
    const answer = await send(
      'POST',
      `/rules/${rule.id}/force`,
      { why, ...consent },
      `"${revision.current}"`,
    );
    if (!answer.ok) return answer;
    revision.current += 1;
    router.refresh();
    say(`Version ${draftNumber} is in force.`);
    return answer;
  }

  /** An older version becomes the draft; of a retired rule, which comes back by it. */
  async function goBack(number: number): Promise<void> {
    setGoing({ busy: number, failure: null });
    setGoing({ busy: null, failure: await bringBack(number) });
  }

  async function bringBack(number: number): Promise<string | null> {
    const how = rule.retiredAt === null ? 'go-back' : 'restore';
    const answer = await send<{ revision?: number }>(
      'POST',
      `/rules/${rule.id}/${how}`,
      { version: number },
      `"${revision.current}"`,
    );
    if (!answer.ok) return answer.fields.version ?? answer.message;
    revision.current = answer.value.revision ?? revision.current + 1;
    const older = rule.versions.find((version) => version.number === number);
    if (older !== undefined) form.reset(await valuesOf(older.body));
    router.refresh();
    say(
      how === 'restore'
        ? `The rule is back, with version ${number} as its draft. Nothing runs by it until you put it into force.`
        : `Version ${number} is the draft now. Look at it, then put it into force.`,
    );
    return null;
  }

  /** Rename, retire, throw the draft away: null where it went well, else why not. */
  async function keep(method: 'PATCH' | 'POST' | 'DELETE', under: string, body?: object) {
    const answer = await send(method, `/rules/${rule.id}${under}`, body, `"${revision.current}"`);
    if (!answer.ok) return answer.fields.name ?? answer.fields.why ?? answer.message;
    revision.current += 1;
    if (method === 'DELETE' && rule.inForce !== null) form.reset(await valuesOf(rule.inForce.body));
    router.refresh();
    return null;
  }

  return { save, force, goBack, going, keep, failure };
}

export type RuleActions = ReturnType<typeof useRuleActions>;
