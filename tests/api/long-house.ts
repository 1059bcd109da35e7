// The long house of `shown`, up to where channels can be wired to it.
import type { Asker } from './asker';
import * as shown from './shown';

export const AT = '/houses/long-house';

/** @returns the house's id */
export async function makeLongHouse(owner: Asker): Promise<string> {
  const house = await owner.make('/houses', shown.house);
  await owner.make(`${AT}/nodes`, shown.node);
  for (const point of [shown.bench, ...shown.otherPoints]) await owner.make(`${AT}/points`, point);
  await owner.make(`${AT}/sources`, shown.source);
  return String(house['id']);
}
