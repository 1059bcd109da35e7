/**
 * The demo's heap book: what was written down, and what it did to the heaps of the yard. Digestible energy follows published
 * recoveries of 1 to 7 MJ a kg of dry matter; manure and fresh wood chips stand in the middle of them.
 */
import type { HeapDeed } from './winter';

const GROWER = 'grower@larkmoor.example';
const OWNER = 'owner@larkmoor.example';
const STONEBECK = 'owner@stonebeck.example';

/** Mixed feeds as they went in, a little warmer than the air from the barn. */
const freshMix = { moisture: 0.6, digestibleJPerKgDry: 4.2e6, tempC: 9 };

export const heapBook: HeapDeed[] = [
  {
    ...{ house: 'long-house', daysAgo: 54, time: '15:30', by: OWNER },
    entry: {
      source: 'gate-heap',
      kind: 'built',
      text: 'Built against the gate wall, pipe in four turns, half a metre up. Straw bales on the north side.',
      materials: [
        { material: 'horse manure with straw', kilograms: 3400 },
        { material: 'wood chips', kilograms: 1600 },
        { material: 'grass and leaves', kilograms: 500 },
      ],
      litresOfWater: 600,
      volume: 11,
    },
  },
  {
    ...{ house: 'long-house', daysAgo: 40, time: '11:00', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'covered',
      text: 'Second layer of sheep wool and a breathing sheet over it, weighted with hose.',
    },
  },
  {
    ...{ house: 'long-house', daysAgo: 29, time: '16:10', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'note',
      text: 'Smells sweet, steams where the probe goes in. Lower edge feels dry to the hand.',
      smell: 'earthy',
      squeeze: 'crumbles',
    },
  },
  {
    ...{ house: 'long-house', daysAgo: 24, time: '14:20', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'fed',
      text: 'Fed through the top, in three pockets, and closed again.',
      materials: [
        { material: 'horse manure with straw', kilograms: 360 },
        { material: 'wood chips', kilograms: 90 },
      ],
      litresOfWater: 30,
    },
    effect: { kind: 'feed', massKg: 480, ...freshMix, moisture: 0.62 },
  },
  {
    ...{ house: 'long-house', daysAgo: 16, time: '13:15', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'watered',
      text: 'Slowly, with the can, along the lower edge. No run-off.',
      litresOfWater: 120,
    },
    effect: { kind: 'feed', massKg: 120, moisture: 1, digestibleJPerKgDry: 0, tempC: 8 },
  },
  {
    ...{ house: 'long-house', daysAgo: 11, time: '10:45', by: OWNER },
    entry: {
      source: 'gate-heap',
      kind: 'turned',
      text: 'Turned with the loader, outside to the inside. Two people; fan off by hand meanwhile.',
      volume: 9.6,
      smell: 'earthy',
      squeeze: 'drops',
    },
    effect: { kind: 'turn' },
  },
  {
    ...{ house: 'long-house', daysAgo: 5, time: '14:40', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'fed',
      text: 'Second feed of the winter, before the cold spell.',
      materials: [
        { material: 'horse manure with straw', kilograms: 300 },
        { material: 'brewers’ grains', kilograms: 100 },
      ],
    },
    effect: { kind: 'feed', massKg: 400, ...freshMix },
  },
  {
    ...{ house: 'long-house', daysAgo: 1, time: '08:40', by: GROWER },
    entry: {
      source: 'gate-heap',
      kind: 'note',
      text: 'North edge dry to the hand: a fistful falls apart. The middle is well.',
      smell: 'earthy',
      squeeze: 'crumbles',
    },
  },
  {
    ...{ house: 'prop-house', daysAgo: 43, time: '12:00', by: OWNER },
    entry: {
      source: 'yew-heap',
      kind: 'built',
      text: 'Built behind the yews, in the old pit, two turns of pipe.',
      materials: [
        { material: 'cattle manure with straw', kilograms: 2300 },
        { material: 'wood chips', kilograms: 1500 },
      ],
      litresOfWater: 350,
      volume: 7.5,
    },
  },
  {
    ...{ house: 'prop-house', daysAgo: 21, time: '15:05', by: GROWER },
    entry: {
      source: 'yew-heap',
      kind: 'fed',
      text: 'One trailer, worked into the top third.',
      materials: [{ material: 'cattle manure with straw', kilograms: 320 }],
      litresOfWater: 20,
    },
    effect: { kind: 'feed', massKg: 340, ...freshMix },
  },
  {
    ...{ house: 'prop-house', daysAgo: 8, time: '11:30', by: GROWER },
    entry: {
      source: 'yew-heap',
      kind: 'note',
      text: 'Sunk a hand’s breadth on the east side since the feed. Cover drawn tight again.',
      volume: 6.9,
      smell: 'earthy',
      squeeze: 'drops',
    },
  },
  {
    ...{ house: 'beck-house', daysAgo: 47, time: '10:00', by: STONEBECK },
    entry: {
      source: 'beck-heap',
      kind: 'built',
      text: 'Leaves, manure and chips in the stone bay.',
      materials: [
        { material: 'leaves', kilograms: 1500 },
        { material: 'horse manure with straw', kilograms: 2000 },
        { material: 'wood chips', kilograms: 800 },
      ],
      volume: 9,
    },
  },
  {
    ...{ house: 'beck-house', daysAgo: 13, time: '14:00', by: STONEBECK },
    entry: {
      source: 'beck-heap',
      kind: 'fed',
      text: 'Manure from the lane.',
      materials: [{ material: 'horse manure with straw', kilograms: 300 }],
    },
    effect: { kind: 'feed', massKg: 300, ...freshMix },
  },
];
