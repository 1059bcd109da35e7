/** Judges a rule's form by the schema that the route uses. A module of its own, since zod is loaded after the page. */
import type { ConditionTree, RuleBody } from '@/lib/control/rule-body';
import { RuleBody as RuleBodySchema } from '@/lib/schema/rule';
import type { Preferences } from '@/lib/units/preferences';
import { bodyOfForm, fieldOfPath, type FormErrors, type RuleForm, type UnitOf } from './form-values';

export interface Judged {
  body: RuleBody | null;
  errors: FormErrors;
}

export function judge(
  form: RuleForm,
  kept: ConditionTree | null,
  unitOf: UnitOf,
  preferences: Preferences,
): Judged {
  const { body, errors: unread } = bodyOfForm(form, kept, unitOf, preferences);
  const judged = RuleBodySchema.safeParse(body);
  const errors: FormErrors = {};
  if (!judged.success) {
    for (const issue of judged.error.issues)
      errors[fieldOfPath(issue.path.map(String).join('.'))] ??= issue.message;
  }
  Object.assign(errors, unread);
  return { body: judged.success && Object.keys(unread).length === 0 ? judged.data : null, errors };
}
