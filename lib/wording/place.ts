/** What of a house's place wants a second look, in words: what it would mean, and what may have happened. */
import type { PlaceFinding } from '@/lib/analysis/place';

const WORDS: Record<PlaceFinding, string> = {
  interchanged:
    'By this longitude the sun would be hours away from the clock of this zone. Latitude and longitude may have been interchanged.',
  'zone-far':
    'By this longitude the sun would be more than three hours away from the clock of this zone. Look at the sign of the longitude (west is minus), and at the zone.',
  'wrong-half':
    'This zone keeps summer time while it is winter at this latitude. Look at the sign of the latitude (south is minus), and at the zone.',
  'in-the-sea': 'Nought by nought lies in the sea off Africa. Give the place of the house.',
  'very-high':
    'Over 3000 m hardly anything is grown in winter. Feet may have been typed for metres: divide by 3.28.',
  'very-low': 'More than 100 m under the sea lie only the shores of salt lakes. Look at the minus.',
  'height-not-told':
    'Nought is the sea’s level. Heat is reckoned from the weight of the air, which at 600 m is 7 % less: give the height to 50 m, off any map.',
};

export const placeWords = (finding: PlaceFinding): string => WORDS[finding];
