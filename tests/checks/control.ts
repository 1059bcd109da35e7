/**
 * Outside values for control and calendar, in our own form. Marks: `published` was read in the text named,
 * `recomputed` follows from the formula named, `practice` is common practice without a source.
 */

/**
 * Two-position control of a first-order lag: x tends to K with the load on, to 0 with it off, time constant τ;
 * switch-off at h, switch-on at l. Recomputed: t_on = τ·ln[(K−l)/(K−h)], t_off = τ·ln(h/l).
 */
export const CYCLES = [
  {
    id: 'F-CYC-1',
    tauS: 3600,
    K: 20,
    h: 6,
    l: 4,
    onS: 480.713,
    offS: 1459.674,
    duty: 0.247741,
    perH: 1.8553,
  },
  { id: 'F-CYC-2', tauS: 1800, K: 12, h: 7, l: 5, onS: 605.65, offS: 605.65, duty: 0.5, perH: 2.972 },
  {
    id: 'F-CYC-3',
    tauS: 3600,
    K: 40,
    h: 10.5,
    l: 9.5,
    onS: 120.011,
    offS: 360.3,
    duty: 0.249861,
    perH: 7.4951,
  },
] as const;

/**
 * F-NMAX, recomputed: the small-band limit of the most starts an hour, K/(4τd), at half load, and the parabola
 * 4·x(1 − x) of that at other loads x. Starts an hour to 1 %: the limit is that of a vanishing band.
 */
export const MOST_STARTS = {
  ...{ tauS: 3600, K: 40, bandK: 1, perH: 10, exactPerH: 9.9979 },
  shares: [
    [0.1, 0.36],
    [0.2, 0.64],
    [0.5, 1],
    [0.8, 0.64],
  ],
} as const;

/** F-DEAD, recomputed: F-CYC-1 with a pure delay of 120 s after each switch; x to 1e-4, times to 0.1 s. */
export const DEAD_TIME = {
  ...{ tauS: 3600, K: 20, h: 6, l: 4, delayS: 120 },
  ...{ greatest: 6.45897, least: 3.86886, onS: 630.1, offS: 1845.03 },
} as const;

/** F-CYC-NEVER, recomputed: K ≤ h never switches off; l ≤ 0 never switches on. */
export const NEVER = [
  { K: 9, h: 10, l: 5, start: 4, duty: 1 },
  { K: 20, h: 6, l: -1, start: 3, duty: 0 },
  { K: 20, h: 6, l: 0, start: 3, duty: 0 },
] as const;

/**
 * F-MINON, recomputed: on 35 °F, off 45 °F; between the thresholds the state is memory. Its own sequence switches at
 * 35 and 45 exactly; ours are strict, so a tenth of a degree past each stands beside them.
 */
export const TRADE_THERMOSTAT = {
  readingsF: [50, 45, 44, 36, 35, 34.9, 36, 44, 45, 45.1, 44, 34.9],
  on: [0, 0, 0, 0, 0, 1, 1, 1, 1, 0, 0, 1],
} as const;

/**
 * J-SET, J-RUN, J-WARMUP and J-CHK-REACH: common practice, no source. On at 35 °F, off at 45 °F; +16 °F of lift never
 * reach off below 29 °F outdoors; a draw of 105 min, 45 min off, and on again; half an hour of warming up.
 */
export const TRADE = {
  ...{ onC: 1.667, offC: 7.222, onF: 35, offF: 45, liftF: 16, reachF: 29 },
  ...{ drawMin: 105, restMin: 45, warmUpMin: 30 },
} as const;

/** Changes of the clock, IANA zone data: [zone, instant, seconds before, seconds after]. */
export const CHANGES = [
  ['Europe/Zurich', '2026-03-29T01:00:00Z', 3600, 7200],
  ['Europe/Zurich', '2026-10-25T01:00:00Z', 7200, 3600],
  ['America/Denver', '2026-03-08T09:00:00Z', -25_200, -21_600],
  ['America/Denver', '2026-11-01T08:00:00Z', -21_600, -25_200],
  ['America/New_York', '2026-03-08T07:00:00Z', -18_000, -14_400],
  ['America/New_York', '2026-11-01T06:00:00Z', -14_400, -18_000],
  ['Australia/Lord_Howe', '2026-04-04T15:00:00Z', 39_600, 37_800],
  ['Australia/Lord_Howe', '2026-10-03T15:30:00Z', 37_800, 39_600],
] as const;

/** F-PERIOD, IANA zone data: the night from 18:00 to 07:00 across a change of the clock. */
export const NIGHT_PERIODS = [
  ['Europe/Zurich', '2026-03-28T17:00:00Z', '2026-03-29T05:00:00Z', 12],
  ['Europe/Zurich', '2026-10-24T16:00:00Z', '2026-10-25T06:00:00Z', 14],
  ['America/Denver', '2026-03-08T01:00:00Z', '2026-03-08T13:00:00Z', 12],
  ['America/Denver', '2026-11-01T00:00:00Z', '2026-11-01T14:00:00Z', 14],
] as const;

/** F-SUN, recomputed by the NOAA/Meeus ch. 25 low-accuracy method at −0.833°; ± 60 s. */
export const SUN = [
  [
    'golden',
    '2003-10-17',
    39.742476,
    -105.1786,
    'America/Denver',
    '2003-10-17T13:12:43Z',
    '2003-10-18T00:18:50Z',
  ],
  [
    'denver',
    '2026-12-21',
    39.7392,
    -104.9903,
    'America/Denver',
    '2026-12-21T14:17:32Z',
    '2026-12-21T23:38:49Z',
  ],
  [
    'denver',
    '2026-06-21',
    39.7392,
    -104.9903,
    'America/Denver',
    '2026-06-21T11:32:11Z',
    '2026-06-22T02:31:29Z',
  ],
  ['zurich', '2026-03-29', 47.3769, 8.5417, 'Europe/Zurich', '2026-03-29T05:10:58Z', '2026-03-29T17:51:03Z'],
  ['zurich', '2026-12-21', 47.3769, 8.5417, 'Europe/Zurich', '2026-12-21T07:10:10Z', '2026-12-21T15:37:36Z'],
  ['zurich', '2026-06-21', 47.3769, 8.5417, 'Europe/Zurich', '2026-06-21T03:29:02Z', '2026-06-21T19:26:15Z'],
] as const;

/** F-SUN-POLAR: Tromsø, neither sunrise nor sunset on the two solstices. */
export const POLAR = { latitude: 69.6492, longitude: 18.9553, zone: 'Europe/Oslo' } as const;
