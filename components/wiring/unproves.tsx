import { Notice } from '@/components/ui/notice';
import { changedWiring, wiringOf, type Wiring } from '@/lib/schema/wiring';
import type { Channel } from '@/lib/schema/yard-view';
import { unprovesWords } from '@/lib/wording/proving';

const PARTS = ['node', 'relay', 'contact', 'load', 'highLimit', 'runProof', 'fallback'] as const;

/** What is typed, where it can be read; a part that cannot is taken for what it was. */
function typed(before: Wiring, body: Record<string, unknown>): Wiring {
  const said = Object.fromEntries(PARTS.flatMap((part) => (part in body ? [[part, body[part]]] : [])));
  const { protection } = body;
  const contactor =
    typeof protection === 'object' &&
    protection !== null &&
    'contactor' in protection &&
    protection.contactor === true;
  return { ...before, ...said, contactor };
}

/** Says before it is saved that a proved channel will have to be proved again. */
export function Unproves({ before, body }: { before: Channel; body: Record<string, unknown> }) {
  const former = wiringOf(before);
  const words = before.provedAt === null ? null : unprovesWords(changedWiring(former, typed(former, body)));
  return (
    <div role="status">
      {words === null ? null : (
        <Notice tone="warn" title="It will count as not proved">
          {words}
        </Notice>
      )}
    </div>
  );
}
