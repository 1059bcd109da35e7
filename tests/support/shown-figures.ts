// What a page shows and what the interface tells, brought into one form so that tests can hold one against the other.
import type { BrowserContext, Page } from 'playwright-core';
import type { NightAnswer } from '@/lib/analysis/night-answer';

/** Any kind of blank as one space: figures and units are bound by blanks that do not break. */
export const plain = (text: string) => text.replaceAll(/\s+/g, ' ').trim();

/** Name and figure of each line of the panel with this title. */
export async function figuresIn(page: Page, title: RegExp): Promise<Record<string, string>> {
  const panel = page.getByRole('region', { name: title });
  await panel.waitFor();
  const lines = await panel.locator('dl > div').evaluateAll((rows) => {
    // a figure and the note under it are neighbours without a blank between
    const textOf = (place: Element | null) =>
      [...(place?.childNodes ?? [])].map((node) =>
        node instanceof Text ? node.data : node instanceof Element ? ` ${node.textContent}` : '',
      );
    return rows.map((row) =>
      [row.querySelector('dt'), row.querySelector('dd')].map((one) => textOf(one).join('')),
    );
  });
  return Object.fromEntries(lines.map(([name = '', figure = '']) => [plain(name), plain(figure)]));
}

/** An answer of the interface to whom this context is signed in as. The shape is the caller's claim, which its test checks. */
export async function told<T>(context: BrowserContext, path: string): Promise<T> {
  const answer = await context.request.get(`/api/v1${path}`);
  if (!answer.ok()) throw new Error(`${path} answered ${answer.status()}`);
  return (await answer.json()) as T;
}

/** Newest last, as Duty has them. */
export async function nightsTold(
  context: BrowserContext,
  house: string,
  source?: string,
): Promise<NightAnswer[]> {
  const query = source === undefined ? 'limit=500' : `source=${source}&limit=500`;
  return (await told<{ items: NightAnswer[] }>(context, `/houses/${house}/nights?${query}`)).items.reverse();
}
