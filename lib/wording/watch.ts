/** What a good head grower would say of the house at the door, from how it stands: three sentences at most, and what is missing. */
import { temperature } from '@/lib/units/format';
import { faultWords } from './because-held';
import { becauseInstant } from './instants';
import { join, sentences } from './join';
import type { Phrase, Tone } from './phrase';
import { midSentence } from './rule-names';
import { begin, pointName, timeWords, type Scene } from './scene';
import { drawSentence, othersSentence } from './watch-draws';
import type { HouseStanding, StandingPoint } from './watch-standing';

const HOUSE_ROLES = ['bench', 'house-air'];
const coloured = (text: string, tone: Tone): Phrase => ({ text, tone });

export function watchSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  return sentences(
    houseSentence(standing, scene),
    frostSentence(standing, scene),
    drawSentence(standing, scene),
    othersSentence(standing, scene),
    outdoorsSentence(standing, scene),
  );
}

/** Words for a house of which no step was ever made. */
export function unknownSentence(houseName: string): Phrase[] {
  return [
    'Nothing is known of the ',
    coloured(midSentence(houseName), 'strong'),
    ' yet: no reading has come from its nodes.',
  ];
}

function ofHouse(standing: HouseStanding): StandingPoint[] {
  return standing.points.filter((point) => HOUSE_ROLES.includes(point.role));
}

function houseSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  const house = midSentence(standing.houseName);
  const inUse = ofHouse(standing).filter((point) => point.quality !== 'bad' && point.value !== null);
  const governed = standing.points.find((point) => point.key === standing.band?.point);
  const shown =
    inUse.find((point) => point === governed) ??
    inUse.find((point) => point.role === 'house-air') ??
    inUse[0];
  const lost = governed !== undefined && governed !== shown ? lostSentence(governed, scene) : [];
  if (shown === undefined) {
    return join(
      coloured(`No sensor of the ${house} answers`, 'alarm'),
      ', so how warm it is cannot be said.',
    );
  }
  const by = shown.role === 'house-air' ? '' : ` by ${pointName(shown.key, scene)}`;
  const doubt = shown.quality === 'uncertain' ? ' (not sure of it)' : '';
  return sentences(
    join(
      `The ${house} stands at `,
      coloured(temperature(shown.value, scene.preferences), 'house'),
      by,
      doubt,
      shown === governed ? bandWords(shown.value, standing) : '',
      '.',
    ),
    lost,
  );
}

function bandWords(value: number | null, { band, frostLimit }: HouseStanding): Phrase[] {
  if (band === null || value === null) return [];
  // the frost sentence says the worse of the two
  if (frostLimit !== null && value < frostLimit) return [', ', coloured('under its band', 'strong')];
  if (value < band.low) return [', ', coloured('under its band', 'strong')];
  return [value > band.high ? ', above its band' : ', inside its band'];
}

function lostSentence(point: StandingPoint, scene: Scene): Phrase[] {
  const since = timeWords(becauseInstant(point.at), scene);
  return [
    coloured(`${begin(pointName(point.key, scene))} is ${faultWords(point.why)}`, 'warn'),
    since === null ? '.' : ` since ${since}.`,
  ];
}

function frostSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  const { frostLimit } = standing;
  if (frostLimit === null) return [];
  const coldest = ofHouse(standing)
    .filter((point) => point.quality !== 'bad' && point.value !== null)
    .reduce<StandingPoint | null>(
      (low, point) => ((point.value ?? 0) < (low?.value ?? Infinity) ? point : low),
      null,
    );
  if (coldest === null || coldest.value === null || coldest.value >= frostLimit) return [];
  return join(
    `${begin(pointName(coldest.key, scene))} is at `,
    coloured(temperature(coldest.value, scene.preferences), 'alarm'),
    ', ',
    coloured(`under the frost limit of ${temperature(frostLimit, scene.preferences)}`, 'alarm'),
    '.',
  );
}

function outdoorsSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  const point = standing.points.find((one) => one.role === 'outdoors');
  if (point === undefined) return [];
  const { coldest } = standing;
  const low =
    coldest === null
      ? ''
      : `, coldest was ${temperature(coldest.value, scene.preferences)} at ${timeWords(coldest.at, scene) ?? ''}`;
  if (point.quality === 'bad' || point.value === null) {
    return [
      `How cold it is outdoors is not known: ${pointName(point.key, scene)} is ${faultWords(point.why)}${low}.`,
    ];
  }
  return join('Outdoors ', coloured(temperature(point.value, scene.preferences), 'outdoors'), `${low}.`);
}
