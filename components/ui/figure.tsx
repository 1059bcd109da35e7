import { classes } from './classes';

const tones = {
  ink: '',
  soft: 'text-soft',
  house: 'text-house',
  outdoors: 'text-outdoors',
  ember: 'text-ember',
  core: 'text-core',
  base: 'text-base-tone',
  warn: 'text-warn',
  alarm: 'text-alarm',
};

/** A figure with its unit, in the mono face, never broken between the two. */
export function Figure({
  children,
  tone = 'ink',
  large = false,
}: {
  children: string;
  tone?: keyof typeof tones;
  large?: boolean;
}) {
  return (
    <span className={classes('whitespace-nowrap font-mono', large && 'text-xl font-semibold', tones[tone])}>
      {children}
    </span>
  );
}
