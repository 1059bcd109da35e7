/** A reversing vent: a motor that opens by one relay and shuts by another, which never are both on. */
import { z } from 'zod';
import { channelFields, Load } from './channel';
import { Key, Name, wholeSeconds } from './common';
import { Channel, Interlock } from './yard-view';

/**
 * Seconds from one relay's being off to the other's being on. Time goes in whole seconds here, so 1 s may be next to
 * nothing: with 2 s a motor has a whole second at least to come to rest before it is reversed.
 * Common practice, no source; the motor's maker may ask for more.
 */
export const DEAD_TIME_S = 2;

const Way = z.strictObject({ number: channelFields.number, relay: channelFields.relay });

const ofOwn = ['number', 'relay'] as const;

export const ReversingVentCreate = z
  .strictObject({
    node: channelFields.node,
    /** Its channels are KEY-open and KEY-shut: five characters are theirs. */
    key: Key.max(58, 'At most 58 characters: -open and -shut are put behind it.'),
    label: Name.max(110, 'At most 110 characters: “, opening” and “, shutting” are put behind it.'),
    open: Way,
    shut: Way,
    load: Load.omit({ kind: true }),
    /** The motor's travel from end to end and a margin; of either way. */
    longestOn: wholeSeconds(1, 3600),
    deadTime: wholeSeconds(1, 3600).default(DEAD_TIME_S),
    startsPerHour: channelFields.startsPerHour.default(null),
    protection: channelFields.protection.default(null),
  })
  .superRefine(({ open, shut }, context) => {
    for (const part of ofOwn.filter((one) => open[one] === shut[one])) {
      context.addIssue({
        code: 'custom',
        path: ['shut', part],
        message: `Opening has this ${part} already: give another for shutting.`,
      });
    }
  });

export const ReversingVent = z.strictObject({ open: Channel, shut: Channel, interlock: Interlock });
export type ReversingVent = z.infer<typeof ReversingVent>;
