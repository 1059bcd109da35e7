/** What the menus show, in the order of a day's work. A page that does not exist has no entry. */
export interface Section {
  key: string;
  label: string;
  /** Of a house, or of the holding as a whole. */
  of: 'house' | 'holding';
  /** Stands in the bar at the phone's foot; the others stand under More. */
  onBar: boolean;
}

export const SECTIONS: readonly Section[] = [
  { key: 'watch', label: 'Watch', of: 'house', onBar: true },
  { key: 'rules', label: 'Rules', of: 'house', onBar: false },
  { key: 'wiring', label: 'Wiring', of: 'house', onBar: false },
  { key: 'heap-book', label: 'Heap book', of: 'house', onBar: true },
  { key: 'duty', label: 'Duty', of: 'house', onBar: true },
  { key: 'money', label: 'Money', of: 'house', onBar: false },
  { key: 'reports', label: 'Reports', of: 'house', onBar: false },
  { key: 'alarms', label: 'Alarms', of: 'house', onBar: true },
  { key: 'files', label: 'Files', of: 'house', onBar: false },
  { key: 'houses', label: 'All houses', of: 'holding', onBar: false },
  { key: 'people', label: 'People', of: 'holding', onBar: false },
];

export interface ShellHouse {
  slug: string;
  name: string;
  /** Standing alarms of this house that nobody has taken on yet, and those of the whole holding. */
  alarms: number;
  rules: number;
}

/** Which house and section an address is of. A holding's page keeps to the first house for its links. */
export function whereIs(
  path: string,
  houses: readonly ShellHouse[],
): { house: ShellHouse | null; section: string | null } {
  const [first, second] = path.split('/').filter(Boolean);
  const own = houses.find((house) => house.slug === first);
  return own === undefined
    ? { house: houses[0] ?? null, section: first ?? null }
    : { house: own, section: second ?? 'watch' };
}

export function hrefOf(section: Section, house: ShellHouse | null): string | null {
  if (section.of === 'holding') return `/${section.key}`;
  return house === null ? null : `/${house.slug}/${section.key}`;
}

/** The same section of another house, so that houses can be compared without finding the way again. */
export function hrefInHouse(house: ShellHouse, section: string | null): string {
  const known = SECTIONS.find((one) => one.key === section && one.of === 'house');
  return `/${house.slug}/${known?.key ?? 'watch'}`;
}

export function badgeOf(section: Section, house: ShellHouse | null): { count: number; words: string } | null {
  const count =
    section.key === 'alarms' ? (house?.alarms ?? 0) : section.key === 'rules' ? (house?.rules ?? 0) : 0;
  if (count === 0) return null;
  return { count, words: section.key === 'alarms' ? `${count} open` : `${count} in force` };
}
