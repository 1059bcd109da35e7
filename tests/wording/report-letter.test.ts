import { expect, it } from 'vitest';
import { reportLetter } from '@/lib/wording/report-letter';

const blocks = [
  {
    key: 'nights',
    title: 'Nights of Gate heap',
    table: { head: ['night', 'kWh'], rows: [['26 Nov', '4.1']], foot: ['This night', '4.1'] },
    notes: ['* thin'],
  },
  {
    key: 'book',
    title: 'Heap book',
    sentence: ['Fed ', { text: '<b>40 L</b> & more', tone: 'strong' as const }],
  },
  { key: 'figures', title: 'Figures', rows: [{ name: 'Heat', value: '4.1 kWh', note: 'of 1 night' }] },
];
const letter = reportLetter('Long house', 'Week', blocks, 'http://localhost/long-house/reports?a=1&b=2');

it('a letter says the same in its text as in its HTML', () => {
  for (const part of ['26 Nov', '4.1 kWh (of 1 night)', '* thin', 'This night'])
    for (const body of [letter.text, letter.html]) expect(body).toContain(part);
  expect(letter.text).toContain('26 Nov      4.1');
  expect(letter.text).toContain('http://localhost/long-house/reports?a=1&b=2');
});
it('what people wrote is text in the HTML, never markup', () => {
  expect(letter.html).toContain('Fed &lt;b&gt;40 L&lt;/b&gt; &amp; more');
  expect(letter.html).not.toContain('<b>');
  expect(letter.html).toContain('reports?a=1&amp;b=2');
});
