/** Who looks after a holding, in words. Roles come as data: what each may do is the permission table's to say. */
import { capital, counted } from './counts';
import { between, join, sentences } from './join';
import type { Phrase } from './phrase';

export interface RoleFacts {
  role: string;
  actions: readonly string[];
}

/** In the order in which they are told; an action without words is part of another. */
const actionWords: [action: string, words: string][] = [
  ['rule.force', 'writes rules and puts them into force'],
  ['channel.hand', 'runs channels by hand'],
  ['heap.write', 'keeps the heap book'],
  ['wiring.write', 'wires and proves channels'],
  ['lockout.remove', 'removes lock-outs'],
  ['people.manage', 'manages people and keys'],
];

/** @example roleSays({role: 'grower', …}) === 'Grower: writes rules and puts them into force, runs channels by hand, …' */
export function roleSays({ role, actions }: RoleFacts): string {
  const words = actionWords.filter(([action]) => actions.includes(action)).map(([, said]) => said);
  return `${capital(role)}: sees everything${words.length === 0 ? '' : `, ${words.join(', ')}`}.`;
}

/** @example "Three people look after Larkmoor Growers: one owner, one grower and one installer. One invitation waits." */
export function peopleSentence(
  holding: string,
  members: readonly { role: string }[],
  invitations: number,
  roles: readonly RoleFacts[],
): Phrase[] {
  const kinds = roles
    .map(({ role }) => ({ role, many: members.filter((member) => member.role === role).length }))
    .filter(({ many }) => many > 0);
  const who = join(
    { text: capital(counted(members.length, 'person', 'people')), tone: 'strong' },
    ` ${members.length === 1 ? 'looks' : 'look'} after ${holding}`,
    members.length === 1 ? '' : ': ',
    members.length === 1
      ? ''
      : between(
          kinds.map(({ role, many }) => [counted(many, role)]),
          ', ',
          ' and ',
        ),
    '.',
  );
  return sentences(
    who,
    invitations === 0
      ? []
      : [
          `${capital(counted(invitations, 'invitation'))} ${invitations === 1 ? 'waits' : 'wait'} for an answer.`,
        ],
  );
}
