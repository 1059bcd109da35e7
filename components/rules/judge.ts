/** Judges a rule's form by the schema that the route uses. A module of its own, since zod is loaded after the page. */
import type { RuleBody } from '@/lib/control/rule-body';
import { RuleBody as RuleBodySchema } from '@/lib/schema/rule';
import type { Preferences } from '@/lib/units/preferences';
import type { FactOf } from './conditions/condition-text';
import { fieldOfPath } from './field-paths';
import { bodyOfForm, type FormErrors } from './form-body';
import type { RuleForm } from './form-values';

export interface Judged {
  body: RuleBody | null;
  errors: FormErrors;
}

export function judge(form: RuleForm, factOf: FactOf, preferences: Preferences): Judged {
  const { body, errors: unread } = bodyOfForm(form, factOf, preferences);
  const judged = RuleBodySchema.safeParse(body);
  const errors: FormErrors = {};
  if (!judged.success) {
    for (const issue of judged.error.issues)
      errors[fieldOfPath(issue.path.map(String).join('.'))] ??= issue.message;
  }
  // a tree with a gap is no tree to the schema, which would say so of the whole
  if (Object.keys(unread).some((path) => path.startsWith('only.'))) delete errors.only;
  Object.assign(errors, unread);
  return { body: judged.success && Object.keys(unread).length === 0 ? judged.data : null, errors };
}
