import { PrintButton } from '@/components/duty/print-button';
import { ButtonLink } from '@/components/ui/button';

export type Paper = 'a4' | 'letter';

const PAPERS = [
  { paper: null, label: 'Paper as in the printer' },
  { paper: 'a4', label: 'A4' },
  { paper: 'letter', label: 'Letter' },
] as const;

/** Which paper the sheet is laid out for; it stands in the address, and not on the paper. */
export function PaperChoice({ house, paper }: { house: string; paper: Paper | null }) {
  return (
    <nav aria-label="Paper" className="not-on-paper flex flex-wrap gap-2">
      {PAPERS.map((one) => (
        <ButtonLink
          key={one.label}
          href={`/${house}/wiring/sheet${one.paper === null ? '' : `?paper=${one.paper}`}`}
          aria-current={one.paper === paper ? 'page' : undefined}
          kind={one.paper === paper ? 'primary' : 'plain'}
        >
          {one.label}
        </ButtonLink>
      ))}
      <PrintButton />
      <ButtonLink href={`/${house}/wiring`}>All of its wiring</ButtonLink>
    </nav>
  );
}
