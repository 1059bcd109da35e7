/** What a new thing begins with in the set-up: guessed from what is wired already, to be looked at in its form. */
import type { Yard } from '@/components/wiring/forms/options';
import type { PointRole } from '@/lib/schema/point';

export interface Beginning {
  label: string;
  first: object;
}

interface Usual {
  label: string;
  role: PointRole;
  key: string;
  /** Offered only where such a source is there, or none is yet. */
  forKind?: 'heap' | 'ground';
}

/** In the order in which they are wanted; the first alone makes a house that can be judged. */
const USUAL: readonly Usual[] = [
  { label: 'House air', role: 'house-air', key: 'house-air' },
  { label: 'Bench', role: 'bench', key: 'bench-1' },
  { label: 'Outdoors', role: 'outdoors', key: 'outdoors' },
  { label: 'Heap core', role: 'heap-core', key: 'heap-core', forKind: 'heap' },
  { label: 'Heap beside the pipe', role: 'heap-base', key: 'heap-base', forKind: 'heap' },
  { label: 'Loop intake', role: 'loop-intake', key: 'loop-intake' },
  { label: 'Loop return', role: 'loop-return', key: 'loop-return' },
  { label: 'Ground', role: 'ground', key: 'ground', forKind: 'ground' },
];

/** Usual points that the house does not have, each with what its form begins with. */
export function usualPoints(yard: Yard): Beginning[] {
  const has = new Set(yard.points.map((one) => one.role));
  const kinds = new Set(yard.sources.map((one) => one.kind));
  return USUAL.filter(
    ({ role, forKind }) =>
      !has.has(role) && (forKind === undefined || kinds.size === 0 || kinds.has(forKind)),
  ).map(({ label, role, key }) => ({
    label,
    first: { name: label, key: freeKey(key, yard), role, sensor: 'one-wire' },
  }));
}

function freeKey(key: string, { points }: Yard): string {
  const taken = new Set(points.map((one) => one.key));
  if (!taken.has(key)) return key;
  for (let count = 2; ; count += 1) if (!taken.has(`${key}-${count}`)) return `${key}-${count}`;
}

/** A heap with its core and base, where points of these roles are free. */
export function firstSource(yard: Yard): object {
  const used = new Set(yard.sources.flatMap((one) => [one.corePoint, one.basePoint]));
  const free = (role: string) => yard.points.find((one) => one.role === role && !used.has(one.key))?.key;
  const [core, base, ground] = [free('heap-core'), free('heap-base'), free('ground')];
  if (core === undefined && ground !== undefined)
    return { name: 'Ground tubes', kind: 'ground', corePoint: ground };
  return {
    kind: 'heap',
    ...(core === undefined ? {} : { corePoint: core, coreFloor: 38 }),
    ...(base === undefined ? {} : { basePoint: base }),
  };
}

/** A fan on the next free relay, of the first source that nothing draws on. */
export function firstChannel(yard: Yard): object {
  const node = yard.nodes.find((one) => one.channels > 0);
  const taken = new Set(yard.channels.filter((one) => one.node === node?.key).map((one) => one.relay));
  let relay = 1;
  while (taken.has(relay)) relay += 1;
  const source = yard.sources.find((one) => yard.channels.every((channel) => channel.source !== one.slug));
  const place = relay <= (node?.channels ?? 0) ? { relay } : {};
  if (source === undefined) return place;
  const isFan = source.kind === 'heap' || source.kind === 'ground';
  const thing = isFan ? 'fan' : 'relay';
  return {
    ...place,
    key: `${source.slug}-${thing}`.slice(0, 63),
    label: `${source.name} ${thing}`,
    source: source.slug,
    load: { kind: source.kind === 'heater' ? 'heater' : 'motor' },
    frostHelp: true,
  };
}

/** The loop of the first heap or ground that has none, with its channel and the points of its roles. */
export function firstLoop(yard: Yard): object {
  const source = yard.sources.find(
    (one) =>
      (one.kind === 'heap' || one.kind === 'ground') && yard.loops.every((loop) => loop.source !== one.slug),
  );
  if (source === undefined) return {};
  const channel = yard.channels.find((one) => one.source === source.slug);
  const used = new Set(yard.loops.map((one) => one.return));
  const intake = yard.points.find((one) => one.role === 'loop-intake');
  const back = yard.points.find((one) => one.role === 'loop-return' && !used.has(one.key));
  return {
    name: `${source.name} loop`,
    source: source.slug,
    ...(channel === undefined ? {} : { channel: channel.key }),
    ...(intake === undefined ? {} : { intake: intake.key }),
    ...(back === undefined ? {} : { return: back.key }),
  };
}
