// The jobs as RFC 5545 has a calendar: folded at 75 octets, escaped, whole days with their end on the next.
import { expect, it } from 'vitest';
import type { CalendarJob } from '@/db/queries/heap-job';
import { writeCalendar } from '@/lib/server/calendar';

const job = (change: Partial<CalendarJob['job']> = {}): CalendarJob => ({
  job: {
    ...{ id: '018f3f3f-0000-7000-8000-000000000001', revision: 3, source: 'gate-heap', kind: 'own' },
    ...{ title: 'Build', dueOn: '2027-09-15', checklist: [], doneAt: null, doneBy: null },
    ...change,
  },
  house: { slug: 'long-house', name: 'Long house' },
  heap: 'Gate heap',
  changedAt: new Date('2026-12-01T09:00:00Z'),
});
const write = (...jobs: CalendarJob[]) => writeCalendar(jobs, 'https://heap.example');
/** RFC 5545, 3.1: a line that begins with a space goes on from the one before. */
const unfolded = (text: string) => text.replace(/\r\n[ \t]/g, '').split('\r\n');
/** RFC 5545, 3.3.11 */
const unescaped = (text: string) =>
  text.replace(/\\([\\;,nN])/g, (_, mark: string) => (/n/i.test(mark) ? '\n' : mark));
const valueOf = (text: string, name: string) =>
  unfolded(text)
    .find((line) => line.startsWith(`${name}:`) || line.startsWith(`${name};`))
    ?.replace(/^[^:]*:/, '');

it('is a calendar of version 2.0 with an identifier of its maker', () => {
  const lines = unfolded(write(job()));
  expect(lines.slice(0, 2)).toEqual(['BEGIN:VCALENDAR', 'VERSION:2.0']);
  expect(lines.filter((line) => line !== '').at(-1)).toBe('END:VCALENDAR');
  expect(lines.some((line) => line.startsWith('PRODID:'))).toBe(true);
});

it('ends every line with CR LF and has none over 75 octets, in the middle of no character', () => {
  const title = `Übergroße Mühe – ${'käse '.repeat(40)}`;
  const text = write(job({ title, checklist: [{ text: title, doneAt: null, doneBy: null }] }));
  expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
  for (const line of text.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
  expect(unescaped(valueOf(text, 'SUMMARY') ?? '')).toBe(`${title} (Gate heap)`);
});

it('escapes what RFC 5545 escapes: backslash, semicolon, comma and a new line', () => {
  // after the text of the RFC's own example in 3.3.11
  const title = 'Project XYZ; final, review\\ at two';
  const text = write(job({ title, checklist: [{ text: 'Conference Room', doneAt: null, doneBy: null }] }));
  expect(valueOf(text, 'SUMMARY')).toContain('Project XYZ\\; final\\, review\\\\ at two');
  expect(unescaped(valueOf(text, 'DESCRIPTION') ?? '')).toBe('☐ Conference Room');
});

it('lets nothing that is written in a job begin a line of its own', () => {
  const title = 'x\r\nEND:VEVENT\r\nBEGIN:VEVENT\r\nSUMMARY:smuggled';
  const lines = unfolded(write(job({ title })));
  expect(lines.filter((line) => line === 'BEGIN:VEVENT')).toHaveLength(1);
  expect(lines.filter((line) => line.startsWith('SUMMARY'))).toHaveLength(1);
});

it('has a job as a whole day that makes nobody busy, wherever it is read', () => {
  const text = write(job());
  expect(unfolded(text)).toEqual(
    expect.arrayContaining([
      'DTSTART;VALUE=DATE:20270915',
      'DTEND;VALUE=DATE:20270916',
      'TRANSP:TRANSPARENT',
    ]),
  );
});

it('names a job by the same identifier each time, and counts its changes', () => {
  const text = write(job());
  expect(valueOf(text, 'UID')).toBe('018f3f3f-0000-7000-8000-000000000001@middenward');
  expect(valueOf(text, 'SEQUENCE')).toBe('2');
  expect(valueOf(text, 'DTSTAMP')).toBe('20261201T090000Z');
});

it('keeps what is done, marked', () => {
  const done = { doneAt: '2026-12-01T09:00:00.000Z', doneBy: 'g' };
  const text = write(job({ ...done, checklist: [{ text: 'Cover on', ...done }] }));
  expect(valueOf(text, 'SUMMARY')).toBe('Done: Build (Gate heap)');
  expect(valueOf(text, 'DESCRIPTION')).toBe('☑ Cover on');
});

it('without jobs is still a calendar', () => {
  expect(write()).toMatch(/^BEGIN:VCALENDAR\r\n[\s\S]*END:VCALENDAR/);
});
