'use client';
import { Panel } from '@/components/ui/panel';
import type { Proof } from '@/lib/schema/proof';
import { clock, day } from '@/lib/units/time';
import { useProving } from './context';
import { Steps } from './steps';

const OUTCOME = { proved: 'proved', 'given-up': 'given up', rewired: 'ended, the wiring was changed' };

/** Proofs that ended, each with all that was written down. */
export function FormerProofs({ proofs }: { proofs: Proof[] }) {
  const { house, preferences } = useProving();
  if (proofs.length === 0) return null;
  const when = (text: string) => {
    const at = Date.parse(text);
    return `${day(at, house.zone)}, ${clock(at, house.zone, preferences)}`;
  };
  return (
    <Panel title="Proofs before">
      <ul className="divide-y divide-line">
        {proofs.map((one) => (
          <li key={one.id} className="py-1">
            <details>
              <summary className="flex min-h-11 cursor-pointer items-center">
                <span>
                  <strong>{when(one.endedAt ?? one.begunAt)}</strong>,{' '}
                  {one.outcome === null ? 'left' : OUTCOME[one.outcome]}, {one.endedBy ?? one.begunBy}
                  {one.outcome === 'given-up' && one.endedWhy !== null ? `: “${one.endedWhy}”` : ''}
                </span>
              </summary>
              <Steps proof={one} mayProve={false} />
            </details>
          </li>
        ))}
      </ul>
    </Panel>
  );
}
