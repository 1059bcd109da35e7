import { describe, expect, it } from 'vitest';
import { allowedTo, ROLES } from '@/lib/server/permissions';
import { peopleSentence, roleSays } from '@/lib/wording/people';
import { plainText } from '@/lib/wording/phrase';

const roles = ROLES.map((role) => ({ role, actions: allowedTo(role) }));
const [owner, grower, installer] = ROLES;

describe('words about people', () => {
  it('count who looks after a holding by their roles, and who was asked', () => {
    const members = [owner, grower, installer].map((role) => ({ role }));
    expect(plainText(peopleSentence('Larkmoor Growers', members, 1, roles))).toBe(
      'Three people look after Larkmoor Growers: one owner, one grower and one installer. One invitation waits for an answer.',
    );
  });

  it('say of one person that they look after it alone', () => {
    expect(plainText(peopleSentence('Larkmoor Growers', [{ role: owner }], 0, roles))).toBe(
      'One person looks after Larkmoor Growers.',
    );
  });

  it('tell of each role what the permission table allows it, and no more', () => {
    expect(roles.map(roleSays)).toEqual([
      'Owner: sees everything, writes rules and puts them into force, runs channels by hand, keeps the heap book, wires and proves channels, removes lock-outs, manages people and keys.',
      'Grower: sees everything, writes rules and puts them into force, runs channels by hand, keeps the heap book.',
      'Installer: sees everything, wires and proves channels, removes lock-outs.',
    ]);
  });
});
