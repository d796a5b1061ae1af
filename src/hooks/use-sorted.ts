import { useMemo, useState } from 'react';

type Orders<T> = Record<string, (item: T) => string | number>;

interface Sorted<T, K> {
  rows: T[];
  sortOf: (key: K) => {
    sorted: 'ascending' | 'descending' | 'none';
    onSort: () => void;
  };
}

/** Rows in the order of one column; a second press turns it round. */
export function useSorted<T, O extends Orders<T>>(
  items: readonly T[],
  orders: O,
  first: { by: keyof O; descending?: boolean },
): Sorted<T, keyof O> {
  const [order, setOrder] = useState({ by: first.by, descending: first.descending ?? false });
  const rows = useMemo(() => {
    const valueOf = orders[order.by];
    if (!valueOf) return [...items];
    const turn = order.descending ? -1 : 1;
    return [...items].sort((a, b) => {
      const [x, y] = [valueOf(a), valueOf(b)];
      const less =
        typeof x === 'string' ? x.localeCompare(String(y), 'en', { numeric: true }) : x - Number(y);
      return turn * less;
    });
  }, [items, orders, order]);
  return {
    rows,
    sortOf: (key) => ({
      sorted: order.by !== key ? 'none' : order.descending ? 'descending' : 'ascending',
      onSort: () =>
        setOrder((now) => ({ by: key, descending: now.by === key ? !now.descending : false })),
    }),
  };
}
