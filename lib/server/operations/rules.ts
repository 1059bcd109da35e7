import { listOf } from '@/lib/schema/common';
import {
  RuleAmend,
  RuleBody,
  RuleCheck,
  RuleCopy,
  RuleCreate,
  RuleForce,
  RuleGoBack,
  RuleRestore,
  RuleRetire,
} from '@/lib/schema/rule';
import { Findings, Rule, RuleListQuery, RuleVersion, RuleWithVersions } from '@/lib/schema/rule-view';
import { operation } from '../operation';

export const listRules = operation({
  id: 'rule.list',
  method: 'GET',
  path: '/houses/{house}/rules',
  action: 'holding.see',
  summary: 'Rules of a house',
  query: RuleListQuery,
  answers: { 200: listOf(Rule) },
});
export const createRule = operation({
  id: 'rule.create',
  method: 'POST',
  path: '/houses/{house}/rules',
  action: 'rule.write',
  summary: 'A new rule, with its first draft',
  body: RuleCreate,
  answers: { 201: Rule },
});
export const getRule = operation({
  id: 'rule.get',
  method: 'GET',
  path: '/rules/{rule}',
  action: 'holding.see',
  summary: 'One rule with its versions',
  answers: { 200: RuleWithVersions },
});
export const amendRule = operation({
  id: 'rule.amend',
  method: 'PATCH',
  path: '/rules/{rule}',
  action: 'rule.write',
  summary: 'Rename a rule',
  body: RuleAmend,
  answers: { 200: RuleWithVersions },
});
export const writeDraft = operation({
  id: 'rule.draft',
  method: 'PUT',
  path: '/rules/{rule}/draft',
  action: 'rule.write',
  summary: 'Write the draft; what is in force stays',
  body: RuleBody,
  answers: { 200: RuleVersion },
});
export const dropDraft = operation({
  id: 'rule.drop-draft',
  method: 'DELETE',
  path: '/rules/{rule}/draft',
  action: 'rule.write',
  summary: 'Throw the draft away',
  answers: { 204: null },
});
export const checkRule = operation({
  id: 'rule.check',
  method: 'POST',
  path: '/rules/{rule}/check',
  action: 'rule.write',
  summary: 'Things to look at before the draft goes into force',
  body: RuleCheck,
  unrecorded: true,
  answers: { 200: Findings },
});
export const forceRule = operation({
  id: 'rule.force',
  method: 'POST',
  path: '/rules/{rule}/force',
  action: 'rule.force',
  summary: 'Put the draft into force',
  body: RuleForce,
  answers: { 200: RuleVersion },
});
export const retireRule = operation({
  id: 'rule.retire',
  method: 'POST',
  path: '/rules/{rule}/retire',
  action: 'rule.force',
  summary: 'Take a rule out of force',
  body: RuleRetire,
  answers: { 200: RuleWithVersions },
});
export const goBack = operation({
  id: 'rule.go-back',
  method: 'POST',
  path: '/rules/{rule}/go-back',
  action: 'rule.write',
  summary: 'Make an older version the draft',
  body: RuleGoBack,
  answers: { 200: RuleVersion },
});
export const restoreRule = operation({
  id: 'rule.restore',
  method: 'POST',
  path: '/rules/{rule}/restore',
  action: 'rule.write',
  summary: 'Bring a retired rule back, as a draft',
  body: RuleRestore,
  answers: { 200: RuleWithVersions },
});
export const copyRule = operation({
  id: 'rule.copy',
  method: 'POST',
  path: '/rules/{rule}/copy',
  action: 'rule.write',
  summary: 'Copy a rule to another channel or house, as a draft',
  body: RuleCopy,
  answers: { 201: Rule },
});
