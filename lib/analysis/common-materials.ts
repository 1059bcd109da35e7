/**
 * Common materials, as a start where nobody has weighed or dried their own. Every figure is a typical value with the
 * range that was found; a heap's own may lie anywhere in it, so the mix is shown with its uncertainty.
 *
 * `table`: the averages that Bertrand's public table of compost materials (Missouri University of Science and Technology,
 * read) gives after the On-Farm Composting Handbook (Rynk, ed., NRAES-54, 1992, appendix A); the ranges are the
 * handbook's, from memory. `memory`: figures of that appendix or of the named kind of table, from memory and not read
 * again: weigh and dry your own where it matters.
 */
export type MaterialSource = 'table' | 'memory';

export interface CommonMaterial {
  name: string;
  /** Other names that it goes by in a book. */
  also: readonly string[];
  /** Per cent of the dry mass, with the range found. */
  nitrogen: Ranged;
  cn: Ranged;
  /** Per cent of the wet mass. */
  moisture: Ranged;
  /** kg/m³ as it comes, loose; null where no figure is known. */
  density: Ranged | null;
  source: MaterialSource;
}
export type Ranged = readonly [typical: number, least: number, most: number];

type Row = readonly [
  name: string,
  also: readonly string[],
  nitrogen: Ranged,
  cn: Ranged,
  moisture: Ranged,
  density: Ranged | null,
  source: MaterialSource,
];

const ROWS: readonly Row[] = [
  [
    'horse manure',
    ['manure, horse', 'stable manure'],
    [1.6, 1.4, 2.3],
    [30, 22, 50],
    [72, 59, 79],
    [815, 720, 960],
    'table',
  ],
  [
    'horse manure with straw',
    ['horse bedding', 'stable bedding', 'horse manure and straw'],
    [1.2, 0.8, 1.7],
    [41, 29, 56],
    [63, 52, 67],
    [450, 300, 600],
    'memory',
  ],
  [
    'cattle manure',
    ['cow manure', 'manure', 'dairy manure'],
    [2.4, 1.5, 4.2],
    [19, 11, 30],
    [81, 67, 87],
    [865, 785, 995],
    'table',
  ],
  [
    'cattle manure with straw',
    ['farmyard manure', 'cow bedding'],
    [2.2, 1.5, 3],
    [20, 14, 30],
    [75, 65, 82],
    [650, 450, 850],
    'memory',
  ],
  ['sheep manure', [], [2.7, 1.3, 3.9], [16, 13, 20], [69, 60, 75], null, 'memory'],
  ['pig manure', ['swine manure'], [3.1, 1.9, 4.3], [14, 9, 19], [80, 65, 91], null, 'memory'],
  ['hen manure', ['chicken manure'], [8, 4, 10], [6, 3, 10], [69, 62, 75], [880, 815, 960], 'table'],
  [
    'poultry litter',
    ['chicken litter', 'poultry bedding', 'broiler litter'],
    [2.7, 1.6, 3.9],
    [14, 12, 15],
    [37, 22, 46],
    [515, 450, 610],
    'table',
  ],
  ['straw', ['straw bales'], [0.7, 0.3, 1.1], [80, 48, 150], [12, 4, 27], [120, 35, 225], 'table'],
  ['wheat straw', [], [0.4, 0.3, 0.5], [127, 100, 150], [12, 4, 27], [120, 35, 225], 'memory'],
  ['oat straw', [], [0.9, 0.6, 1.1], [60, 48, 98], [12, 4, 27], [120, 35, 225], 'memory'],
  ['hay', [], [2.1, 0.7, 3.6], [22, 15, 32], [10, 8, 15], [130, 60, 200], 'memory'],
  [
    'leaves',
    ['dry leaves', 'autumn leaves', 'leaves, dry'],
    [0.9, 0.5, 1.3],
    [54, 40, 80],
    [38, 15, 50],
    [120, 60, 180],
    'table',
  ],
  ['leaf mould', ['leaf mold'], [0.4, 0.3, 1], [60, 40, 80], [40, 30, 60], [360, 250, 450], 'table'],
  [
    'grass clippings',
    ['grass', 'grass, greens', 'lawn mowings'],
    [3.4, 2, 6],
    [17, 9, 25],
    [82, 70, 87],
    [205, 180, 240],
    'table',
  ],
  [
    'wood chips',
    ['wood chip', 'chips', 'hardwood chips'],
    [0.09, 0.06, 0.11],
    [560, 451, 819],
    [40, 25, 55],
    [260, 200, 350],
    'memory',
  ],
  [
    'shredded prunings',
    ['shrub trimmings', 'hedge trimmings'],
    [1, 0.6, 1.6],
    [53, 35, 80],
    [15, 10, 50],
    [255, 150, 350],
    'memory',
  ],
  ['bark', ['softwood bark'], [0.14, 0.04, 0.39], [496, 131, 1285], [40, 30, 60], [250, 200, 350], 'memory'],
  ['sawdust', ['wood shavings'], [0.24, 0.06, 0.8], [442, 200, 750], [39, 19, 65], [240, 205, 265], 'table'],
  [
    'newspaper',
    ['paper', 'newsprint'],
    [0.1, 0.06, 0.14],
    [650, 398, 852],
    [5, 3, 8],
    [130, 115, 145],
    'table',
  ],
  [
    'cardboard',
    ['corrugated cardboard'],
    [0.1, 0.08, 0.12],
    [563, 450, 650],
    [8, 5, 12],
    [150, 100, 180],
    'table',
  ],
  [
    'kitchen scraps',
    ['table waste', 'food scraps', 'kitchen, greens', 'kitchen waste'],
    [2.4, 1.9, 2.9],
    [15, 14, 16],
    [70, 65, 85],
    [420, 350, 600],
    'table',
  ],
  [
    'vegetable trimmings',
    ['vegetable waste', 'greens', 'garden waste'],
    [3.2, 2.5, 4],
    [12, 11, 13],
    [80, 65, 90],
    [500, 350, 900],
    'memory',
  ],
  ['fruit waste', ['fruit'], [1.4, 0.9, 2.6], [40, 20, 49], [80, 62, 88], [700, 500, 950], 'memory'],
  ['apple pomace', ['pomace'], [1.1, 0.9, 1.4], [48, 35, 55], [75, 65, 88], [700, 500, 925], 'memory'],
  ['coffee grounds', ['coffee'], [2, 1.8, 2.5], [20, 17, 25], [70, 55, 80], [500, 400, 840], 'table'],
  [
    'brewers’ grains',
    ['brewers grains', "brewers' grains", 'spent grain'],
    [4, 3.2, 4.6],
    [12, 10, 15],
    [77, 72, 81],
    [950, 800, 1050],
    'memory',
  ],
  ['seaweed', [], [1.9, 1.2, 3], [17, 5, 27], [53, 40, 85], null, 'memory'],
  ['maize stalks', ['corn stalks'], [0.7, 0.6, 0.8], [67, 60, 73], [12, 10, 30], [20, 15, 40], 'memory'],
  ['finished compost', ['compost'], [1.6, 1, 2.5], [14, 10, 20], [45, 35, 55], [600, 450, 750], 'memory'],
];

export const COMMON_MATERIALS: readonly CommonMaterial[] = ROWS.map(
  ([name, also, nitrogen, cn, moisture, density, source]) => ({
    ...{ name, also, nitrogen, cn, moisture, density, source },
  }),
);
