/** Seeded generator of numbers in [0, 1): mulberry32 (public domain, from memory). Same seed, same world. */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export const pick = <const T>(random: () => number, items: readonly [T, ...T[]]): T =>
  items[Math.floor(random() * items.length)] ?? items[0];
