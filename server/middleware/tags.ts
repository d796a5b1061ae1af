import { stale } from '../errors.ts';

/** A strong tag, the same for every reader. */
export const tagOf = (id: string, version: number): string => `"${id}-v${version}"`;

/** Refuses a change that was made on an old copy; an empty tag never matches. */
export const checkTag = (ifMatch: string, id: string, version: number, what: string): void => {
  const tags = ifMatch.split(',').map((tag) => tag.trim());
  if (!tags.includes(tagOf(id, version))) throw stale(what);
};
