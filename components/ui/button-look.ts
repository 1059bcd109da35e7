/** How what is pressed looks, apart from what it does: who needs no more of it does not carry Next's link along. */
import { classes } from './classes';

export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'alarm';

const looks: Record<ButtonKind, string> = {
  primary: 'border-ink bg-ink text-paper hover:bg-ink/85 disabled:hover:bg-ink',
  plain: 'border-edge bg-sheet text-ink hover:bg-faint disabled:hover:bg-sheet',
  quiet: 'border-transparent bg-transparent text-ink underline underline-offset-4 hover:bg-faint',
  alarm: 'border-alarm bg-alarm text-paper hover:bg-alarm/85 disabled:hover:bg-alarm',
};

/** 44 px at least, for gloves; the label never breaks. */
const shape =
  'inline-flex min-h-11 min-w-11 items-center justify-center gap-2 rounded-lg border px-4 py-2 text-[0.95rem] font-semibold leading-tight whitespace-nowrap disabled:opacity-55 aria-disabled:opacity-55';

export function buttonLook(kind: ButtonKind, className?: string): string {
  return classes(shape, looks[kind], className);
}
