import { z } from 'zod';
import { finite, Name, Zone } from './common';

export const houseFields = {
  name: Name,
  zone: Zone,
  latitude: finite(-90, 90, '°'),
  longitude: finite(-180, 180, '°'),
  altitude: finite(-450, 6000, 'm'),
  frostLimit: finite(-40, 15, '°C').nullable(),
  frostAlarm: finite(-40, 15, '°C').nullable(),
  /** A thermostat that works without any software: what it is set to, and when somebody saw it work. */
  lastResort: z
    .strictObject({
      below: finite(-40, 15, '°C'),
      provedOn: z.iso.date({ error: 'Give the date as YYYY-MM-DD.' }).nullable().default(null),
    })
    .nullable(),
};
export const HouseCreate = z.strictObject({
  ...houseFields,
  altitude: houseFields.altitude.default(0),
  frostLimit: houseFields.frostLimit.default(null),
  frostAlarm: houseFields.frostAlarm.default(null),
  lastResort: houseFields.lastResort.default(null),
});
export const HouseAmend = z.strictObject(houseFields).partial();
