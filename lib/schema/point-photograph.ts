import { z } from 'zod';
import { Uuid } from './common';
import { Photograph } from './heap-view';

/** What a picture of a point shows: where the probe hangs, or what keeps the sun off it. */
export const PHOTOGRAPH_SHOWS = ['place', 'shield'] as const;
const Shows = z.enum(PHOTOGRAPH_SHOWS, { error: 'Say what it shows: place or shield.' });

/** The id is made by whoever sends it: sent twice, it is kept once. */
export const PointPhotographSend = z.strictObject({ id: Uuid.optional(), shows: Shows.default('place') });
export const PointPhotograph = z.strictObject({ ...Photograph.shape, shows: Shows });
export type PointPhotograph = z.infer<typeof PointPhotograph>;
