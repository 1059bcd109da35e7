/** How the rules of a house stand, for the head of their page. */
import { capital, counted } from './counts';
import { between, join } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface RuleStanding {
  channelLabel: string;
  isInForce: boolean;
  hasDraft: boolean;
  /** Null while the worker has not told. */
  state: 'on' | 'off' | null;
}

/** @example "Four rules are in force. The gate-heap fan runs. One draft waits, of the bench mat." */
export function rulesSentence(rules: RuleStanding[]): Phrase[] {
  const inForce = rules.filter((rule) => rule.isInForce);
  const label = (rule: RuleStanding): Phrase => ({ text: midSentence(rule.channelLabel), tone: 'strong' });
  if (rules.length === 0) {
    return join(
      { text: 'No rule yet, so nothing runs by itself.', tone: 'strong' },
      ' Frost help and hand still work.',
    );
  }
  const running = unique(inForce.filter((rule) => rule.state === 'on'));
  const drafts = unique(rules.filter((rule) => rule.hasDraft));
  return join(
    inForce.length === 0
      ? { text: 'No rule is in force, so nothing runs by itself.', tone: 'strong' }
      : {
          text: `${capital(counted(inForce.length, 'rule is', 'rules are'))} in force.`,
          tone: 'strong',
        },
    inForce.every((rule) => rule.state === null)
      ? ''
      : running.length === 0
        ? inForce.length === 0
          ? ''
          : ' None of their loads runs now.'
        : join(
            ' The ',
            between(running.map(label), ', ', ' and '),
            running.length === 1 ? ' runs now.' : ' run now.',
          ),
    drafts.length === 0
      ? ''
      : join(
          ` ${capital(counted(drafts.length, 'draft waits', 'drafts wait'))}, of the `,
          between(drafts.map(label), ', ', ' and '),
          '.',
        ),
  );
}

/** Two rules of one channel are one load. */
function unique(rules: RuleStanding[]): RuleStanding[] {
  return rules.filter(
    (rule, index) => rules.findIndex((other) => other.channelLabel === rule.channelLabel) === index,
  );
}
