/**
 * A sentence as data: plain text, and pieces that carry the colour of their line in the chart below, or a weight.
 * Wording stays pure; components/ui/sentence.tsx paints it. The words alone must read well: colour only supports them.
 */
export type Tone = 'strong' | 'house' | 'outdoors' | 'ember' | 'core' | 'base' | 'soft' | 'warn' | 'alarm';
export type Phrase = string | { text: string; tone: Tone };

/** The words alone: for a title, a mail, a screen reader, a test. */
export function plainText(phrases: readonly Phrase[]): string {
  return phrases.map((phrase) => (typeof phrase === 'string' ? phrase : phrase.text)).join('');
}
