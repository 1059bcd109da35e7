/**
 * Units as loggers and spreadsheets write them, against the unit in which a point keeps its readings. The list is closed:
 * a unit that is not in it is asked for, never guessed, since a wrong one is not seen in the figures afterwards.
 */
export interface FileUnit {
  /** As a reader chooses it. */
  label: string;
  /** Unit of points that it can be turned into. */
  kept: string;
  /** Kept value = (value in the file + before) × factor. */
  before: number;
  factor: number;
  /** How heads of columns write it; compared without spaces and capitals. */
  written: readonly string[];
}

const unit = (
  label: string,
  kept: string,
  factor: number,
  written: readonly string[] = [],
  before = 0,
): FileUnit => ({ label, kept, before, factor, written: [label, ...written].map(plain) });

function plain(text: string): string {
  return text
    .normalize('NFKC')
    .toLowerCase()
    .replace(/\s/g, '')
    .replaceAll('º', '°')
    .replaceAll('˚', '°')
    .replaceAll('^', '');
}

/** By the key that is kept in an import's layout. */
export const FILE_UNITS = {
  Cel: unit('°C', 'Cel', 1, ['c', 'degc', 'deg.c', 'celsius', 'grad c', '℃']),
  degF: unit('°F', 'Cel', 5 / 9, ['f', 'degf', 'deg.f', 'fahrenheit', '℉'], -32),
  kelvin: unit('K (absolute)', 'Cel', 1, ['kelvin'], -273.15),
  K: unit('K (difference)', 'K', 1, ['k']),
  'degF-difference': unit('°F (difference)', 'K', 5 / 9),
  '%RH': unit('%RH', '%RH', 1, ['%', '%rf', '%rel', '%r.h.', 'rh%', '%hr', '% r.f.']),
  '%': unit('%', '%', 1),
  '/': unit('share of 1', '/', 1, ['/']),
  'percent-share': unit('% of a share', '/', 0.01),
  'W/m2': unit('W/m²', 'W/m2', 1, ['w/m2', 'wm-2', 'w/sqm', 'w m-2']),
  ppm: unit('ppm', 'ppm', 1),
  Pa: unit('Pa', 'Pa', 1),
  hPa: unit('hPa', 'Pa', 100, ['mbar', 'mb']),
  kPa: unit('kPa', 'Pa', 1000),
  'm/s': unit('m/s', 'm/s', 1, ['ms-1']),
  'km/h': unit('km/h', 'm/s', 1 / 3.6, ['kmh', 'kph']),
  mph: unit('mph', 'm/s', 0.44704),
  W: unit('W', 'W', 1, ['watt', 'watts']),
  kW: unit('kW', 'W', 1000),
  Wh: unit('Wh', 'Wh', 1),
  kWh: unit('kWh', 'Wh', 1000),
  V: unit('V', 'V', 1, ['volt', 'volts']),
  mV: unit('mV', 'V', 0.001),
  A: unit('A', 'A', 1, ['amp', 'amps']),
  mA: unit('mA', 'A', 0.001),
  'm3/s': unit('m³/s', 'm3/s', 1),
  'm3/h': unit('m³/h', 'm3/s', 1 / 3600),
  'L/s': unit('L/s', 'm3/s', 0.001),
  cfm: unit('cfm', 'm3/s', 0.3048 ** 3 / 60, ['ft3/min', 'cu ft/min']),
} as const satisfies Record<string, FileUnit>;
export type FileUnitKey = keyof typeof FILE_UNITS;

export function isFileUnit(key: string): key is FileUnitKey {
  return Object.hasOwn(FILE_UNITS, key);
}

const KEYS = Object.keys(FILE_UNITS).filter(isFileUnit);

/** Units that a point kept in `kept` can be read from, its own first. */
export function fileUnitsOf(kept: string): FileUnitKey[] {
  return KEYS.filter((key) => FILE_UNITS[key].kept === kept);
}

/** The value in the point's unit. @example kept(50, 'degF') === 10 */
export function keptValue(value: number, key: FileUnitKey): number {
  const { before, factor } = FILE_UNITS[key];
  return (value + before) * factor;
}

/**
 * The unit that a column's head names, in brackets or as one of its words; null where it names none that is known.
 * @example unitInHead('Bench 1 (°F)') === 'degF', unitInHead('Lufttemperatur [°C]') === 'Cel'
 */
export function unitInHead(head: string): FileUnitKey | null {
  const bracketed = [...head.matchAll(/[([{]([^)\]}]{1,20})[)\]}]/g)].map((match) => match[1] ?? '');
  const worded = head.split(/[\s,;:_]+/).filter((word) => !/^[a-z]$/i.test(word));
  for (const said of [...bracketed, ...worded.reverse()]) {
    const found = KEYS.find((key) => FILE_UNITS[key].written.includes(plain(said)));
    if (found !== undefined) return found;
  }
  return null;
}
