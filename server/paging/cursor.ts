import type { ObjectLiteral, SelectQueryBuilder } from 'typeorm';
import { z } from 'zod';
import { plainStrings } from '../plain-text';
import { InvalidRequest } from '../problems/domain-errors';

export interface PageRequest {
  limit: number;
  cursor?: string | undefined;
}

export interface Page<T> {
  items: T[];
  nextCursor: string | null;
}

type Key = [string | number, string | number];

/** What a cursor may hold for each column type; anything else would only make PostgreSQL fail. */
const KEY_PART = {
  timestamptz: z.iso.datetime(),
  text: z.string().max(300),
  integer: z.int32(),
  uuid: z.uuid(),
};

const encode = (key: Key) => Buffer.from(JSON.stringify(key)).toString('base64url');

function decode(cursor: string, type: keyof typeof KEY_PART, tieType: keyof typeof KEY_PART): Key {
  try {
    const schema = z.tuple([KEY_PART[type], KEY_PART[tieType]]);
    return schema.parse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'), plainStrings));
  } catch {
    throw new InvalidRequest('The page mark does not fit.', [
      { pointer: '/query/cursor', detail: 'Use nextCursor of the page before, or leave it out.' },
    ]);
  }
}

export interface PageOrder<T> {
  /** Property the list is sorted by, then by `id` (as `alias.property`), and its PostgreSQL type. */
  column: string;
  type: Exclude<keyof typeof KEY_PART, 'uuid'>;
  tie: string;
  tieType: 'uuid' | 'integer';
  direction: 'ASC' | 'DESC';
  keyOf: (item: T) => Key;
}

/** One page in a stable order: rows after the cursor's (column, tie) pair, none twice, none left out. */
export async function pageOf<T extends ObjectLiteral>(
  query: SelectQueryBuilder<T>,
  order: PageOrder<T>,
  { limit, cursor }: PageRequest,
): Promise<Page<T>> {
  if (cursor !== undefined) {
    const [value, tie] = decode(cursor, order.type, order.tieType);
    const beyond = order.direction === 'ASC' ? '>' : '<';
    query.andWhere(
      `(${order.column}, ${order.tie}) ${beyond} (CAST(:pageValue AS ${order.type}), CAST(:pageTie AS ${order.tieType}))`,
      { pageValue: value, pageTie: tie },
    );
  }
  const rows = await query
    .orderBy(order.column, order.direction)
    .addOrderBy(order.tie, order.direction)
    .limit(limit + 1)
    .getMany();
  const items = rows.slice(0, limit);
  const last = rows.length > limit ? items.at(-1) : undefined;
  return { items, nextCursor: last ? encode(order.keyOf(last)) : null };
}

/** The usual order of lists: newest first. */
export function newestFirst<T extends { id: string; createdAt: Date }>(alias: string): PageOrder<T> {
  return {
    column: `${alias}.createdAt`,
    type: 'timestamptz',
    tie: `${alias}.id`,
    tieType: 'uuid',
    direction: 'DESC',
    keyOf: (item) => [item.createdAt.toISOString(), item.id],
  };
}
