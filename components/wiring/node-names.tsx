import { OfferButton } from './editing';
import { nodeStatus } from './node-status';
import { partLine } from './part-line';
import { suggestPoint } from './suggest-point';

/** Names that a node sends and nobody has named yet: each becomes a point in one press, and may then be looked over. */
export function NodeNames({
  node,
  kept,
  pointKeys,
}: {
  node: string;
  kept: Record<string, unknown> | undefined;
  pointKeys: readonly string[];
}) {
  const names = nodeStatus(kept).unknown.filter(({ name }) => !pointKeys.includes(name));
  if (names.length === 0) return null;
  return (
    <section aria-label={`Names of ${node} without a point`} className="mt-4">
      <h3 className="font-semibold">
        Node {node} sends {names.length === 1 ? 'a name' : `${names.length} names`} without a point
      </h3>
      <p className="text-[0.9rem] text-soft">What it sends under them is refused until it has a point.</p>
      <ul className="divide-y divide-line">
        {names.map(({ name, unit }) => (
          <li key={name} className={partLine}>
            <span className="min-w-0 wrap-anywhere">
              <span className="font-mono">{name}</span>{' '}
              <span className="text-soft">{unit === null ? 'without a unit' : `in ${unit}`}</span>
            </span>
            <OfferButton
              kind="point"
              label="Add as a point…"
              of={name}
              given={{ ...suggestPoint(name, unit), node }}
            />
          </li>
        ))}
      </ul>
    </section>
  );
}
