import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { z } from 'zod';

type Shape = Record<string, z.ZodType>;
type Values<S extends Shape> = { [K in keyof S]: z.output<S[K]> };
type Patch<S extends Shape> = Partial<
  Record<keyof S, string | number | boolean | null | undefined>
>;

const read = <S extends Shape>(shape: S, search: URLSearchParams): Values<S> => {
  const values: Record<string, unknown> = {};
  for (const [name, type] of Object.entries(shape)) {
    const given = type.safeParse(search.get(name) ?? undefined);
    // What a link says wrongly is left out, as if it had not been said.
    values[name] = given.success ? given.data : type.safeParse(undefined).data;
  }
  // The loop above fills exactly the members of the shape.
  return values as Values<S>;
};

/**
 * State that lives in the URL, so that a link is a view. Every member of the shape must accept `undefined`
 * (optional or with a default); `null` or '' in a patch removes a member.
 */
export function useUrlState<S extends Shape>(
  shape: S,
): [Values<S>, (patch: Patch<S>, options?: { push?: boolean }) => void] {
  const [search, setSearch] = useSearchParams();
  const values = useMemo(() => read(shape, search), [shape, search]);
  const change = useCallback(
    (patch: Patch<S>, options: { push?: boolean } = {}) => {
      setSearch(
        (before) => {
          const after = new URLSearchParams(before);
          for (const [name, value] of Object.entries(patch))
            if (value === null || value === undefined || value === '') after.delete(name);
            else after.set(name, String(value));
          return after;
        },
        { replace: !options.push, preventScrollReset: true },
      );
    },
    [setSearch],
  );
  return [values, change];
}
