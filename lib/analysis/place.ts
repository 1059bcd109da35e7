/**
 * Whether a house's place, height and time zone fit each other. Nobody is refused for it, since the borders of zones are
 * politics; yet a minus that was left out, two figures that were interchanged, or feet typed for metres give a wrong
 * sunset or too heavy an air for years, and nobody notices.
 */
export interface Place {
  latitude: number;
  longitude: number;
  /** m */
  altitude: number;
  zone: string;
}

export type PlaceFinding =
  'interchanged' | 'zone-far' | 'wrong-half' | 'in-the-sea' | 'very-high' | 'very-low' | 'height-not-told';

const QUARTER_H = 900_000;
/** Middle of January and of July of one year: the two offsets of a zone that puts its clock forward. */
const [JANUARY, JULY] = [Date.UTC(2026, 0, 15), Date.UTC(2026, 6, 15)];
/** The sun takes an hour for it. */
const DEGREES_AN_HOUR = 15;
/** China keeps one zone over four hours of sun, so the widest lawful distance is over three. */
const FAR_H = 3.25;
/** m; over it hardly anything is grown in a winter, under the other lie only shores of salt lakes. */
const [VERY_HIGH, VERY_LOW] = [3000, -100];

/**
 * Hours by which a zone's clocks are ahead of UTC at an instant.
 * @example zoneOffsetH('Asia/Kolkata', 0) === 5.5
 * @throws RangeError for what is no zone
 */
export function zoneOffsetH(zone: string, at: number): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    ...{ year: 'numeric', month: 'numeric', day: 'numeric', hour: 'numeric', minute: 'numeric' },
    hourCycle: 'h23',
  }).formatToParts(at);
  const part = (type: Intl.DateTimeFormatPartTypes) =>
    Number(parts.find((one) => one.type === type)?.value ?? 0);
  const there = Date.UTC(part('year'), part('month') - 1, part('day'), part('hour'), part('minute'));
  return (Math.round((there - at) / QUARTER_H) * QUARTER_H) / 3_600_000;
}

/** Hours between the sun at a longitude and the standard time of a zone, the short way round. */
function hoursOff(longitude: number, standardH: number): number {
  const off = Math.abs(longitude / DEGREES_AN_HOUR - standardH) % 24;
  return Math.min(off, 24 - off);
}

/** What of a place wants a second look; empty: it fits. An unknown zone is the form's own matter. */
export function placeFindings({ latitude, longitude, altitude, zone }: Place): PlaceFinding[] {
  const found: PlaceFinding[] = [];
  let offsets: [january: number, july: number] | null = null;
  try {
    offsets = [zoneOffsetH(zone, JANUARY), zoneOffsetH(zone, JULY)];
  } catch {
    offsets = null;
  }
  if (latitude === 0 && longitude === 0) found.push('in-the-sea');
  else if (offsets !== null) {
    const standard = Math.min(...offsets);
    if (zone !== 'UTC' && hoursOff(longitude, standard) > FAR_H)
      found.push(
        hoursOff(latitude, standard) <= 1.5 && Math.abs(longitude) <= 90 ? 'interchanged' : 'zone-far',
      );
    // summer time is kept in summer: in July north of the equator, in January south of it
    const [january, july] = offsets;
    if ((july > january && latitude < 0) || (january > july && latitude > 0)) found.push('wrong-half');
  }
  if (altitude > VERY_HIGH) found.push('very-high');
  if (altitude < VERY_LOW) found.push('very-low');
  if (altitude === 0) found.push('height-not-told');
  return found;
}
