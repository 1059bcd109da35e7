// SOURCE: offsets of zones from the IANA time zone database (2026): Kolkata +5:30, London 0 and +1, Hobart +10 and +11.
import { describe, expect, it } from 'vitest';
import { placeFindings, zoneOffsetH, type Place } from '@/lib/analysis/place';

const london: Place = { latitude: 54.2, longitude: -2.3, altitude: 310, zone: 'Europe/London' };

describe('a zone’s offset', () => {
  it.each([
    ['Asia/Kolkata', '2026-01-15', 5.5],
    ['Europe/London', '2026-01-15', 0],
    ['Europe/London', '2026-07-15', 1],
    ['Australia/Hobart', '2026-01-15', 11],
    ['America/St_Johns', '2026-01-15', -3.5],
    ['UTC', '2026-07-15', 0],
  ])('%s on %s', (zone, day, hours) => {
    expect(zoneOffsetH(zone, Date.parse(`${day}T12:00:00Z`))).toBe(hours);
  });
});

describe('a house’s place', () => {
  it('is let be where it fits its zone', () => {
    expect(placeFindings(london)).toEqual([]);
    expect(
      placeFindings({ latitude: -42.9, longitude: 147.3, altitude: 50, zone: 'Australia/Hobart' }),
    ).toEqual([]);
    // the widest lawful distances: China’s far west, Spain, Argentina
    expect(placeFindings({ latitude: 43.8, longitude: 87.6, altitude: 800, zone: 'Asia/Shanghai' })).toEqual(
      [],
    );
    expect(placeFindings({ latitude: 42.9, longitude: -8.5, altitude: 260, zone: 'Europe/Madrid' })).toEqual(
      [],
    );
    expect(
      placeFindings({ latitude: -32.9, longitude: -68.8, altitude: 750, zone: 'America/Argentina/Mendoza' }),
    ).toEqual([]);
    // over the date line
    expect(placeFindings({ latitude: 51.9, longitude: -176.6, altitude: 5, zone: 'America/Adak' })).toEqual(
      [],
    );
  });

  it('is asked about where the minus of a longitude was left out', () => {
    expect(placeFindings({ latitude: 45, longitude: 93.3, altitude: 250, zone: 'America/Chicago' })).toEqual([
      'zone-far',
    ]);
  });

  it('is asked about where latitude and longitude were interchanged', () => {
    expect(placeFindings({ latitude: -2.3, longitude: 54.2, altitude: 310, zone: 'Europe/London' })).toEqual([
      'interchanged',
      'wrong-half',
    ]);
  });

  it('is asked about where summer time comes in its winter', () => {
    expect(placeFindings({ ...london, latitude: -54.2 })).toEqual(['wrong-half']);
    expect(
      placeFindings({ latitude: 42.9, longitude: 147.3, altitude: 50, zone: 'Australia/Hobart' }),
    ).toEqual(['wrong-half']);
  });

  it('is asked about where its height is nought, or of feet, or under the sea', () => {
    expect(placeFindings({ ...london, altitude: 0 })).toEqual(['height-not-told']);
    expect(placeFindings({ ...london, altitude: 4200 })).toEqual(['very-high']);
    expect(placeFindings({ ...london, altitude: -310 })).toEqual(['very-low']);
  });

  it('says one thing of nought by nought, and nothing of the zone while that is half typed', () => {
    expect(placeFindings({ latitude: 0, longitude: 0, altitude: 10, zone: 'Europe/London' })).toEqual([
      'in-the-sea',
    ]);
    expect(placeFindings({ ...london, zone: 'Europe/Lond' })).toEqual([]);
  });
});
