/** A report as a letter: the same blocks as the page, once as plain text and once as HTML. */
import { plainText } from './phrase';
import type { ReportBlock } from './report';

export interface LetterParts {
  subject: string;
  text: string;
  html: string;
}

/** @param link to the page with the same report */
export function reportLetter(
  house: string,
  title: string,
  blocks: readonly ReportBlock[],
  link: string,
): LetterParts {
  const subject = `${house}: ${title}`;
  return {
    subject,
    text: [subject, ...blocks.map(blockText), `The same with its charts, to print:\n${link}`].join('\n\n'),
    html: [
      '<!doctype html><html lang="en"><meta charset="utf-8"><body style="font-family:sans-serif;color:#000;background:#fff">',
      `<h1 style="font-size:20px">${escaped(subject)}</h1>`,
      ...blocks.map(blockHtml),
      `<p><a href="${escaped(link)}">The same with its charts, to print</a></p></body></html>`,
    ].join('\n'),
  };
}

function blockText({ title, sentence, rows, table, notes }: ReportBlock): string {
  return [
    title.toUpperCase(),
    ...(sentence === undefined ? [] : [plainText(sentence)]),
    ...(rows ?? []).map(
      ({ name, value, note }) => `${name}: ${value}${note === undefined ? '' : ` (${note})`}`,
    ),
    ...(table === undefined
      ? []
      : columns([table.head, ...table.rows, ...(table.foot === undefined ? [] : [table.foot])])),
    ...(notes ?? []),
  ].join('\n');
}

/** Cells under each other where all are short; long words would only break the lines. */
function columns(rows: readonly (readonly string[])[]): string[] {
  const widths = (rows[0] ?? []).map((_, at) => Math.max(...rows.map((row) => row[at]?.length ?? 0)));
  const isNarrow = widths.reduce((sum, width) => sum + width + 2, 0) <= 76;
  return rows.map((row) =>
    isNarrow
      ? row
          .map((cell, at) => (at === 0 ? cell.padEnd(widths[at] ?? 0) : cell.padStart(widths[at] ?? 0)))
          .join('  ')
      : row.filter((cell) => cell !== '').join('; '),
  );
}

const CELL = 'style="padding:2px 10px 2px 0;text-align:left;border-bottom:1px solid #bbb;vertical-align:top"';

function blockHtml({ title, sentence, rows, table, notes }: ReportBlock): string {
  const line = (cells: readonly string[], tag: 'td' | 'th') =>
    `<tr>${cells.map((cell) => `<${tag} ${CELL}>${escaped(cell)}</${tag}>`).join('')}</tr>`;
  const pairs = (rows ?? []).map(({ name, value, note }) =>
    line([name, note === undefined ? value : `${value} (${note})`], 'td'),
  );
  return [
    `<h2 style="font-size:16px">${escaped(title)}</h2>`,
    ...(sentence === undefined ? [] : [`<p>${escaped(plainText(sentence))}</p>`]),
    ...(table === undefined
      ? []
      : [
          `<table style="border-collapse:collapse">${line(table.head, 'th')}${table.rows.map((row) => line(row, 'td')).join('')}${table.foot === undefined ? '' : line(table.foot, 'th')}</table>`,
        ]),
    ...(pairs.length === 0 ? [] : [`<table style="border-collapse:collapse">${pairs.join('')}</table>`]),
    ...(notes ?? []).map((note) => `<p>${escaped(note)}</p>`),
  ].join('\n');
}

const SIGNS: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => SIGNS[sign] ?? sign);
}
