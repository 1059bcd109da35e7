/** Reads the address of Duty on the server; what makes addresses is apart, so that a browser need not load a schema. */
import { z } from 'zod';
import { type DutyAddress, SORTS } from './address';
import { readAgainst } from './against';

const Night = z.iso.date().optional().catch(undefined);

/** What an address cannot mean falls back to what the page shows without it: it is a view, not a change. */
const Address = z
  .object({
    source: z.string().max(140).optional().catch(undefined),
    nights: z.coerce.number().int().min(1).max(400).catch(35),
    from: Night,
    to: Night,
    against: z
      .string()
      .max(300)
      .refine((text) => readAgainst(text) !== null)
      .optional()
      .catch(undefined),
    night: Night,
    sort: z.enum(SORTS).catch('night'),
    order: z.enum(['up', 'down']).catch('up'),
  })
  .transform((address): DutyAddress => {
    const { from, to } = address;
    const isRange = from !== undefined && to !== undefined && from <= to;
    return isRange ? address : { ...address, from: undefined, to: undefined };
  });

export function readAddress(params: Record<string, string | string[] | undefined>): DutyAddress {
  return Address.parse({ nights: 35, sort: 'night', order: 'up', ...params });
}
