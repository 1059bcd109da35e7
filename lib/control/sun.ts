/** Sunrise and sunset of a local date at a place. */
import { DateTime } from 'luxon';
import { getTimes } from 'suncalc';

export interface SunDay {
  sunrise: number | null;
  sunset: number | null;
  /** `up`: the sun does not set that day; `down`: it does not rise. */
  polar: 'up' | 'down' | null;
}

/**
 * The two events of the solar day round a local noon (epoch ms), epoch ms, to about a minute: the sun's upper edge
 * at the horizon, −0.833°. Degrees, north and east positive. Where they do not happen they are null and `polar` says
 * which way. From local noon, so that the sunset of an American evening stays on its own date.
 */
export function sunOfDay(noon: number, latitude: number, longitude: number): SunDay {
  const times = getTimes(DateTime.fromMillis(noon).toJSDate(), latitude, longitude);
  return {
    sunrise: times.sunrise === null ? null : Math.round(times.sunrise.getTime()),
    sunset: times.sunset === null ? null : Math.round(times.sunset.getTime()),
    polar: times.alwaysUp === true ? 'up' : times.alwaysDown === true ? 'down' : null,
  };
}
