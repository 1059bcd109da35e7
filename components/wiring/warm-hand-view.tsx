import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import type { FieldNode, House, Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { WarmHand } from './warm-hand';

/** The warm-hand test of one node's probes. */
export function WarmHandView({
  house,
  nodes,
  points,
  asked,
  preferences,
}: {
  house: House;
  nodes: FieldNode[];
  points: Point[];
  /** Key of a node, out of the address. */
  asked: string | null;
  preferences: Preferences;
}) {
  const node = nodes.find((one) => one.key === asked) ?? nodes[0];
  const probes = points.filter((one) => one.node === node?.key && one.unit === 'Cel');
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before="Warm-hand test"
        phrases={['Hold one probe in the closed hand: the point that warms is the one it is wired to.']}
      />
      <div className="flex flex-wrap gap-2">
        <ButtonLink href={`/${house.slug}/wiring`}>All of its wiring</ButtonLink>
        {nodes
          .filter((one) => one.key !== node?.key)
          .map((one) => (
            <ButtonLink key={one.id} href={`/${house.slug}/wiring/warm-hand?node=${one.key}`}>
              The probes of {one.key}
            </ButtonLink>
          ))}
      </div>
      {probes.length === 0 || node === undefined ? (
        <Empty title="No probe to hold yet.">
          Register a node and add its points first; then each can be told from the others by hand.
        </Empty>
      ) : (
        <Panel title={`Probes of ${node.key}`}>
          <WarmHand key={node.key} house={house.slug} points={probes} preferences={preferences} />
        </Panel>
      )}
    </div>
  );
}
