import type { Group } from '../spec';

export const houseGroups: Group[] = [
  {
    specs: [
      { as: 'text', path: 'name', label: 'Name' },
      {
        as: 'text',
        path: 'zone',
        label: 'Time zone',
        hint: 'By its IANA name, such as Europe/London. Seasons, hours and nights go by it.',
      },
    ],
  },
  {
    title: 'Place',
    note: 'For sunrise and sunset, and for the density of the air.',
    columns: 3,
    specs: [
      { as: 'number', path: 'latitude', label: 'Latitude, north', quantity: 'number', unit: '°' },
      {
        as: 'number',
        path: 'longitude',
        label: 'Longitude, east',
        quantity: 'number',
        unit: '°',
        hint: 'West is minus.',
      },
      { as: 'number', path: 'altitude', label: 'Altitude', quantity: 'number', unit: 'm' },
    ],
  },
  {
    title: 'Frost',
    note: 'Under the limit every channel that is marked to help runs, out of season and through its rest. Under the alarm somebody is woken.',
    specs: [
      {
        as: 'number',
        path: 'frostLimit',
        label: 'Act below',
        quantity: 'temperature',
        empty: 'null',
        hint: 'Empty: no frost help.',
      },
      {
        as: 'number',
        path: 'frostAlarm',
        label: 'Wake somebody below',
        quantity: 'temperature',
        empty: 'null',
        hint: 'Empty: no frost alarm.',
      },
    ],
  },
  {
    title: 'Thermostat of last resort',
    note: 'One that switches a heater without any software, set under the lowest band. Empty: there is none.',
    nullUnless: { path: 'lastResort', unless: 'lastResort.below' },
    specs: [
      { as: 'number', path: 'lastResort.below', label: 'Set to', quantity: 'temperature', empty: 'null' },
      {
        as: 'text',
        path: 'lastResort.provedOn',
        label: 'Somebody saw it work on',
        empty: 'null',
        hint: 'Turn it up until the heater comes on, then back. As 2026-10-01.',
      },
    ],
  },
];
