interface Arc {
  to: number;
  capacity: number;
  cost: number;
  back: number;
}

/**
 * The most valuable choice of intervals of which at most `channels` are on at once: a min-cost flow of so many units
 * along the line of instants (successive shortest paths by Bellman and Ford; textbook method, from memory).
 */
export function mostValuableIntervals(
  intervals: readonly { from: number; to: number; value: number }[],
  channels: number,
): number {
  const instants = [...new Set(intervals.flatMap(({ from, to }) => [from, to]))].sort(
    (a, b) => a - b,
  );
  const node = new Map(instants.map((instant, index) => [instant, index]));
  const graph: Arc[][] = instants.map(() => []);
  const connect = (from: number, to: number, capacity: number, cost: number): void => {
    const [out, back] = [graph[from] ?? [], graph[to] ?? []];
    out.push({ to, capacity, cost, back: back.length });
    back.push({ to: from, capacity: 0, cost: -cost, back: out.length - 1 });
  };
  for (let index = 0; index + 1 < instants.length; index++) connect(index, index + 1, channels, 0);
  for (const { from, to, value } of intervals)
    connect(node.get(from) ?? 0, node.get(to) ?? 0, 1, -value);
  let total = 0;
  for (let unit = 0; unit < channels; unit++) {
    const gain = pushOne(graph, instants.length - 1);
    if (gain <= 0) break;
    total += gain;
  }
  return total;
}

/** Sends one unit from the first node to the last along the cheapest path; what it gains. */
function pushOne(graph: Arc[][], last: number): number {
  const distance = graph.map((_, index) => (index === 0 ? 0 : Infinity));
  const by: ([number, number] | null)[] = graph.map(() => null);
  for (let changed = true; changed;) {
    changed = false;
    for (const [from, arcs] of graph.entries())
      for (const [position, { to, capacity, cost }] of arcs.entries()) {
        const length = (distance[from] ?? Infinity) + cost;
        if (capacity <= 0 || length >= (distance[to] ?? Infinity) - 1e-9) continue;
        [distance[to], by[to], changed] = [length, [from, position], true];
      }
  }
  for (let at = last; at !== 0;) {
    const step = by[at];
    if (!step) return 0;
    const arc = graph[step[0]]?.[step[1]];
    if (!arc) return 0;
    arc.capacity--;
    const reverse = graph[arc.to]?.[arc.back];
    if (reverse) reverse.capacity++;
    at = step[0];
  }
  return -(distance[last] ?? 0);
}
