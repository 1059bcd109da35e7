/** Photographs of rating plates and wirings, kept beside those of the heap book and made anew like them. */
import 'server-only';
import { and, asc, eq, isNotNull } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { attachment } from '@/db/schema/heap';
import { proof } from '@/db/schema/proof';
import type { ProofPicture } from '@/lib/schema/proof';
import type { MadePhotograph } from './attachment';
import { isId } from './reference';

export interface FoundPicture extends ProofPicture {
  proofId: string;
}

const facts = {
  ...{ id: attachment.id, proofId: attachment.proofId, shows: attachment.shows },
  ...{ width: attachment.widthPx, height: attachment.heightPx },
  ...{ by: attachment.by, enteredAt: attachment.enteredAt },
};

async function select(holding: Holding, only: ReturnType<typeof eq> | undefined): Promise<FoundPicture[]> {
  const rows = await holding.db
    .select(facts)
    .from(attachment)
    .innerJoin(proof, and(eq(proof.holdingId, attachment.holdingId), eq(proof.id, attachment.proofId)))
    .where(and(eq(attachment.holdingId, holding.id), isNotNull(attachment.proofId), only))
    .orderBy(asc(attachment.enteredAt), asc(attachment.id));
  return rows.map(({ proofId, shows, enteredAt, ...row }) => ({
    ...row,
    proofId: proofId ?? '',
    shows: shows === 'plate' ? ('plate' as const) : ('wiring' as const),
    enteredAt: enteredAt.toISOString(),
  }));
}

/** Oldest first. */
export async function picturesOf(holding: Holding, proofId: string): Promise<ProofPicture[]> {
  return (await select(holding, eq(attachment.proofId, proofId))).map(told);
}

export async function findPicture(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<FoundPicture | null> {
  if (!isId(id)) return null;
  return (await select(holding, and(eq(proof.houseId, houseId), eq(attachment.id, id))))[0] ?? null;
}

export async function addPicture(
  holding: Holding,
  proofId: string,
  shows: ProofPicture['shows'],
  made: MadePhotograph,
  act: { by: string; now: Date },
): Promise<ProofPicture> {
  const id = uuid();
  await holding.db.insert(attachment).values({
    ...{ holdingId: holding.id, id, proofId, shows, by: act.by, enteredAt: act.now },
    ...{ widthPx: made.width, heightPx: made.height, image: made.image, thumbnail: made.thumbnail },
  });
  const { width, height } = made;
  return { id, shows, width, height, by: act.by, enteredAt: act.now.toISOString() };
}

const told = ({ id, shows, width, height, by, enteredAt }: FoundPicture): ProofPicture => ({
  ...{ id, shows, width, height, by, enteredAt },
});
