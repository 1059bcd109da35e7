/** What a name that a node sends probably is, so that its form is nearly filled in. A suggestion: whoever wires it decides. */

export interface SuggestedPoint {
  key: string;
  name: string;
  role: string;
  unit: string;
}

const ROLE_OF_UNIT: Record<string, string> = {
  '%RH': 'humidity',
  'W/m2': 'light',
  A: 'current',
  V: 'voltage',
  W: 'power',
  Pa: 'pressure',
  '/': 'contact',
};

/** Of a temperature, by its name; the first that fits. */
const ROLE_OF_NAME: [RegExp, string][] = [
  [/core/, 'heap-core'],
  [/base|pipe/, 'heap-base'],
  [/edge/, 'heap-edge'],
  [/return/, 'loop-return'],
  [/intake/, 'loop-intake'],
  [/bench|bed|tray/, 'bench'],
  [/outdoor|outside/, 'outdoors'],
  [/ground|soil/, 'ground'],
  [/air|house/, 'house-air'],
];
const ROLE_OF_GAS: [RegExp, string][] = [
  [/co2/, 'gas-co2'],
  [/nh3|ammonia/, 'gas-nh3'],
  [/co/, 'gas-co'],
];
/** Units that a reading may be sent in, and the one that its point is kept in. */
const KEPT_IN: Record<string, string> = {
  Far: 'Cel',
  '%': '/',
  hPa: 'Pa',
  mV: 'V',
  mA: 'A',
  kW: 'W',
  kWh: 'Wh',
};

/** @example suggestPoint('bench-2', 'Far') is { key: 'bench-2', name: 'Bench 2', role: 'bench', unit: 'Cel' } */
export function suggestPoint(name: string, unit: string | null): SuggestedPoint {
  const kept = unit === null ? 'Cel' : (KEPT_IN[unit] ?? unit);
  const words = name.replaceAll(/[-_.:/]+/g, ' ').trim();
  return {
    key: name,
    name: words.charAt(0).toUpperCase() + words.slice(1),
    role: roleOf(name.toLowerCase(), kept),
    unit: kept,
  };
}

function roleOf(name: string, unit: string): string {
  const by = (table: [RegExp, string][]) => table.find(([fits]) => fits.test(name))?.[1] ?? 'other';
  if (unit === 'Cel') return by(ROLE_OF_NAME);
  if (unit === 'ppm') return by(ROLE_OF_GAS);
  return ROLE_OF_UNIT[unit] ?? 'other';
}
