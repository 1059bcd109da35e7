/** Clocks that loggers were set by: that of a zone, or one with a fixed offset, which many keep through the summer. */
import { FixedOffsetZone, IANAZone, type Zone } from 'luxon';

const FIXED = /^(?:utc|gmt)?\s*([+\-−–])\s*(\d{1,2})(?::?([0-5]\d))?$/i;

/** Minutes east of UTC; null where the text tells no offset, or none that any place has. @example fixedOffset('UTC-07:00') === -420 */
export function fixedOffset(text: string): number | null {
  const found = FIXED.exec(text.trim());
  if (found === null) return null;
  const [, sign = '', hours = '', minutes = '0'] = found;
  const offset = Number(hours) * 60 + Number(minutes);
  return offset > 14 * 60 ? null : sign === '+' ? offset : -offset;
}

/** As a layout keeps it. @example zoneOfOffset(-420) === 'UTC-07:00' */
export function zoneOfOffset(minutes: number): string {
  if (minutes === 0) return 'UTC';
  const [hours, rest] = [Math.floor(Math.abs(minutes) / 60), Math.abs(minutes) % 60];
  return `UTC${minutes < 0 ? '-' : '+'}${String(hours).padStart(2, '0')}:${String(rest).padStart(2, '0')}`;
}

const QUARTER_MS = 900_000;
const DAY_MS = 86_400_000;

/** Times on the wall of one zone as instants. Offsets change at quarters of an hour only, so one look a quarter is enough. */
export class ZoneClock {
  private readonly zone: Zone;
  private readonly offsets = new Map<number, number[]>();
  private last = { quarter: Number.NaN, offsets: [0] };

  /** @param zone IANA name, or a fixed offset such as `UTC-07:00` */
  constructor(zone: string) {
    const offset = fixedOffset(zone);
    this.zone = offset === null ? IANAZone.create(zone) : FixedOffsetZone.instance(offset);
  }

  /** Instants at which the wall shows this, the earlier first: one, two where it comes twice, none where it is skipped. */
  instantsOf(wall: number): number[] {
    return this.offsetsAt(wall).map((offset) => wall - offset);
  }

  /** A skipped time with the offset before the gap. */
  beforeGap(wall: number): number {
    return wall - this.zone.offset(wall - DAY_MS) * 60_000;
  }

  private offsetsAt(wall: number): number[] {
    const quarter = Math.floor(wall / QUARTER_MS);
    if (quarter === this.last.quarter) return this.last.offsets;
    let offsets = this.offsets.get(quarter);
    if (offsets === undefined) {
      const about = [wall - DAY_MS, wall + DAY_MS].map((at) => this.zone.offset(at) * 60_000);
      offsets = [...new Set(about)]
        .filter((offset) => this.zone.offset(wall - offset) * 60_000 === offset)
        .sort((a, b) => b - a);
      this.offsets.set(quarter, offsets);
    }
    this.last = { quarter, offsets };
    return offsets;
  }
}
