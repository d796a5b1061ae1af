import type { EntityManager } from '@mikro-orm/sqlite';
import { badRequest } from './errors.ts';

export interface PageWish {
  limit: number;
  cursor?: string | undefined;
}
export interface PageOf<T> {
  items: T[];
  nextCursor: string | null;
}

type Place = [string | number, string];

const encode = (place: Place): string => Buffer.from(JSON.stringify(place)).toString('base64url');

const decode = (cursor: string): Place => {
  try {
    const place: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
    if (Array.isArray(place) && place.length === 2 && typeof place[1] === 'string')
      return place as Place;
  } catch {
    // falls through to the one answer for every unreadable cursor
  }
  throw badRequest('The cursor is not one that this list gave out.');
};

interface Listing {
  /** Field that orders the list; the id breaks ties. */
  sort: string;
  descending?: boolean;
  where?: object;
}

/** One page by keyset: always limited, always ordered, stable while rows come and go. */
export const listPage = async <T extends { id: string }>(
  em: EntityManager,
  entity: { prototype: T } | object,
  wish: PageWish,
  { sort, descending = false, where = {} }: Listing,
): Promise<PageOf<T>> => {
  const beyond = descending ? '$lt' : '$gt';
  const order = descending ? 'desc' : 'asc';
  const place = wish.cursor ? decode(wish.cursor) : null;
  const after = place
    ? [
        {
          $or: [
            { [sort]: { [beyond]: place[0] } },
            { [sort]: place[0], id: { [beyond]: place[1] } },
          ],
        },
      ]
    : [];
  const rows = (await em.find(
    entity as never,
    { $and: [where, ...after] } as never,
    { orderBy: { [sort]: order, id: order }, limit: wish.limit + 1 } as never,
  )) as T[];
  const items = rows.slice(0, wish.limit);
  const last = items.at(-1);
  const value = last ? (last as Record<string, unknown>)[sort] : null;
  return {
    items,
    nextCursor:
      rows.length > wish.limit && last ? encode([value as string | number, last.id]) : null,
  };
};
