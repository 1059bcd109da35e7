/** Sunrise and sunset of a local date at a place. */
import { getTimes } from 'suncalc';
import { DateTime } from 'luxon';

export interface SunDay {
  sunrise: number | null;
  sunset: number | null;
  /** `up`: the sun does not set that day; `down`: it does not rise. */
  polar: 'up' | 'down' | null;
}

/**
 * The two events of the solar day round the local noon of a date, epoch ms, to about a minute (the sun's upper edge
 * at the horizon, −0.833°). Near the pole, where one or both do not happen, they are null and `polar` says which way.
 */
export function sunDay(date: DateTime, latitude: number, longitude: number): SunDay {
  // suncalc takes the solar day whose noon is nearest: local noon, so that an American evening stays on its own date
  const noon = date.set({ hour: 12, minute: 0, second: 0, millisecond: 0 });
  const times = getTimes(noon.toJSDate(), latitude, longitude);
  const sunrise = times.sunrise?.getTime() ?? null;
  const sunset = times.sunset?.getTime() ?? null;
  const polar = times.alwaysUp === true ? 'up' : times.alwaysDown === true ? 'down' : null;
  return { sunrise, sunset, polar };
}
