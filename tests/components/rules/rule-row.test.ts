import { createElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { expect, it } from 'vitest';
import { RulesView } from '@/components/rules/rules-view';
import type { RulesData } from '@/components/rules/rule-row';
import { USUAL } from '@/lib/units/preferences';

const version = { id: 'v', number: 1, status: 'in-force', by: 'a', forcedAt: '2026-11-01T12:00:00Z' };
const body = { purpose: 'warm', point: 'bench', standIns: [], band: [{ from: '00:00', low: 4, high: 7 }] };
const rule = { id: 'r', slug: 'r', name: 'A rule', channel: 'fan', body, draft: null, retiredAt: null };
const data = {
  house: { slug: 'long-house', zone: 'Europe/London' },
  rules: [{ ...rule, inForce: { ...version, body } }],
  ...{ retired: [], points: [], sources: [] },
  channels: [{ key: 'fan', number: 1, label: 'Fan', load: { kind: 'motor' } }],
  state: { channels: [{ key: 'fan', state: 'on' }], points: [] },
};
const says = (controlRuns: boolean) =>
  renderToStaticMarkup(
    createElement(RulesView, {
      data: { ...data, controlRuns } as unknown as RulesData,
      allowed: [],
      preferences: USUAL,
    }),
  ).replace(/<[^>]*>/g, '');

it('a rule’s load is on while control runs, and was last seen on while it does not', () => {
  expect(says(true)).toMatch(/runs now\..*Channel 1: on/s);
  const without = says(false);
  expect(without).toContain('Channel 1: last seen on');
  expect(without).not.toMatch(/runs now/);
});
