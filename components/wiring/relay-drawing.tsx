import { classes } from '@/components/ui/classes';

/**
 * Coil and contact as a circuit shows them: the coil a box, filled while it has current; the contact's arm drawn where it
 * is. What is not known is dashed. The words beside it say the same.
 */
export function RelayDrawing({
  contact,
  isCoilOn,
  isClosed,
}: {
  contact: 'NO' | 'NC';
  isCoilOn: boolean | null;
  isClosed: boolean | null;
}) {
  const dashed = isClosed === null ? '3 3' : undefined;
  return (
    <svg aria-hidden="true" viewBox="0 0 88 30" className="w-full max-w-28">
      <rect
        x="3"
        y="10"
        width="16"
        height="13"
        rx="1.5"
        className={classes(
          'stroke-current',
          isCoilOn === true ? 'fill-current text-ember' : 'fill-none text-ink',
        )}
        strokeWidth="1.6"
        strokeDasharray={isCoilOn === null ? '3 3' : undefined}
      />
      <path d="M19 16.5h9" className="stroke-edge" strokeWidth="1.2" strokeDasharray="2 2" />
      <g className={classes('fill-current stroke-current', isClosed === true ? 'text-ember' : 'text-ink')}>
        <circle cx="34" cy="22" r="3" stroke="none" />
        <circle cx="76" cy="22" r="3" stroke="none" />
        <path
          d={isClosed === true ? 'M34 22H76' : 'M34 22 68 9'}
          fill="none"
          strokeWidth="2.4"
          strokeDasharray={dashed}
        />
        {/* the fixed contact of an NC relay stands on the arm's side of rest */}
        {contact === 'NC' ? <path d="M76 22V12h-6" fill="none" strokeWidth="1.6" /> : null}
      </g>
    </svg>
  );
}
