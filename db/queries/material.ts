import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { heapMaterial } from '@/db/schema/heap';
import { Material, type MaterialCreate } from '@/lib/schema/material';
import { isId } from './reference';

type Given = z.infer<typeof MaterialCreate>;
interface Act {
  by: string;
  now: Date;
}

function toMaterial(row: typeof heapMaterial.$inferSelect): Material {
  const { id, revision, name, moisture, carbon, nitrogen, from, by } = row;
  return Material.parse({
    ...{ id, revision, name, moisture, carbon, nitrogen, from, by },
    density: row.densityKgPerM3,
  });
}

/** The holding's own materials, by name. */
export async function listMaterials(holding: Holding): Promise<Material[]> {
  const rows = await holding.db
    .select()
    .from(heapMaterial)
    .where(and(eq(heapMaterial.holdingId, holding.id), isNull(heapMaterial.removedAt)))
    .orderBy(asc(sql`lower(${heapMaterial.name})`));
  return rows.map(toMaterial);
}

export async function findOwnMaterial(holding: Holding, id: string): Promise<Material | null> {
  return isId(id) ? ((await listMaterials(holding)).find((one) => one.id === id) ?? null) : null;
}

const columns = ({ name, density, moisture, carbon, nitrogen, from }: Given) => ({
  ...{ name, moisture, carbon, nitrogen, from },
  densityKgPerM3: density,
});

export async function createMaterial(holding: Holding, given: Given, act: Act): Promise<Material> {
  const [row] = await holding.db
    .insert(heapMaterial)
    .values({ ...columns(given), id: uuid(), holdingId: holding.id, by: act.by, enteredAt: act.now })
    .returning();
  if (row === undefined) throw new Error('the material was written and did not come back');
  return toMaterial(row);
}

export async function amendMaterial(holding: Holding, id: string, given: Given, act: Act): Promise<Material> {
  const [row] = await holding.db
    .update(heapMaterial)
    .set({
      ...columns(given),
      ...{ amendedBy: act.by, amendedAt: act.now, revision: sql`${heapMaterial.revision} + 1` },
    })
    .where(and(eq(heapMaterial.holdingId, holding.id), eq(heapMaterial.id, id)))
    .returning();
  if (row === undefined) throw new Error('the material was there a moment ago');
  return toMaterial(row);
}

/** Entries name their materials in words, so an old entry stays as it was written. */
export async function removeMaterial(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(heapMaterial)
    .set({ removedAt: now })
    .where(and(eq(heapMaterial.holdingId, holding.id), eq(heapMaterial.id, id)));
}
