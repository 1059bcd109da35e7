import 'server-only';
import { and, eq, isNull, type SQL } from 'drizzle-orm';
import type { AnyPgColumn, PgTable } from 'drizzle-orm/pg-core';
import { validate } from 'uuid';
import type { Holding } from '@/db/client';
import { channel, source } from '@/db/schema/channel';
import { node, point } from '@/db/schema/node';
import { Refusal } from './refusal';

/** An id, if the text is one: a path or body may name a thing by its id or by its slug, key or number. */
export function isId(ref: string): boolean {
  return validate(ref);
}

export interface Named {
  id: string;
  key: string;
}

/** The names of one kind of thing in a house: found by key or id, told by key. */
export class NameBook {
  private readonly byKey: Map<string, Named>;
  private readonly byId: Map<string, Named>;

  constructor(
    private readonly kind: string,
    rows: Named[],
  ) {
    this.byKey = new Map(rows.map((row) => [row.key, row]));
    this.byId = new Map(rows.map((row) => [row.id, row]));
  }

  has(ref: string): boolean {
    return this.byKey.has(ref) || this.byId.has(ref);
  }

  /** @throws Refusal at `path` when this house has no such thing */
  find(ref: string, path: string): Named {
    const named = this.byKey.get(ref) ?? this.byId.get(ref);
    if (named === undefined)
      throw new Refusal(path, `This house has no ${this.kind} ${JSON.stringify(ref)}.`);
    return named;
  }

  id(ref: string | null | undefined, path: string): string | null {
    return ref === null || ref === undefined ? null : this.find(ref, path).id;
  }

  key(id: string | null): string | null {
    return id === null ? null : (this.byId.get(id)?.key ?? null);
  }
}

export interface HouseNames {
  points: NameBook;
  nodes: NameBook;
  channels: NameBook;
  sources: NameBook;
}

/** The names that bodies of one house may use. */
export async function houseNames(holding: Holding, houseId: string): Promise<HouseNames> {
  const points = await holding.db
    .select({ id: point.id, key: point.key })
    .from(point)
    .where(inUse(holding, houseId, point));
  const nodes = await holding.db
    .select({ id: node.id, key: node.key })
    .from(node)
    .where(inUse(holding, houseId, node));
  const channels = await holding.db
    .select({ id: channel.id, key: channel.key })
    .from(channel)
    .where(inUse(holding, houseId, channel));
  const sources = await holding.db
    .select({ id: source.id, key: source.slug })
    .from(source)
    .where(inUse(holding, houseId, source));
  return {
    points: new NameBook('point', points),
    nodes: new NameBook('node', nodes),
    channels: new NameBook('channel', channels),
    sources: new NameBook('source', sources),
  };
}

type OfHouse = PgTable & { holdingId: AnyPgColumn; houseId: AnyPgColumn; removedAt: AnyPgColumn };

/** Things of a house that are in use: every table of the yard has the same three columns. */
export function inUse(holding: Holding, houseId: string, table: OfHouse): SQL | undefined {
  return and(eq(table.holdingId, holding.id), eq(table.houseId, houseId), isNull(table.removedAt));
}
