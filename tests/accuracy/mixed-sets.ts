/** The mix of invented orbits, the stations and the masks of the proof and of the benches. */
import { readFileSync } from 'node:fs';
import type { Observer } from '../../shared/orbit/observer.ts';
import type { HorizonMask } from '../../shared/orbit/pass-search.ts';

export interface NamedSet {
  name: string;
  kind: string;
  line1: string;
  line2: string;
}

/** Repeatable numbers in [0, 1): a linear congruence with the constants of the C standard's example. */
export function seededNumbers(seed: number): () => number {
  let state = seed % 2 ** 31;
  return () => {
    state = (state * 1_103_515_245 + 12_345) % 2 ** 31;
    return state / 2 ** 31;
  };
}

/** All 1,000 sets. */
export function allSets(): NamedSet[] {
  const path = new URL('./fixtures/orbit/mix-1000.tle', import.meta.url);
  const lines = readFileSync(path, 'utf8').split('\n');
  const sets: NamedSet[] = [];
  for (let index = 0; index + 2 < lines.length; index += 3) {
    const [name = '', line1 = '', line2 = ''] = lines.slice(index, index + 3);
    sets.push({ name, kind: name.split(' ')[1] ?? '', line1, line2 });
  }
  return sets;
}

/** Some sets of each kind, drawn by a seed. */
export function mixedSets({ perKind, seed }: { perKind: number; seed: number }): NamedSet[] {
  const next = seededNumbers(seed);
  const all = allSets();
  const kinds = [...new Set(all.map(({ kind }) => kind))];
  return kinds.flatMap((kind) => {
    const sets = all.filter((set) => set.kind === kind);
    const drawn = Array.from({ length: perKind }, () => Math.floor(next() * sets.length));
    return drawn.flatMap((index) => sets[index] ?? []);
  });
}

export const PROOF_STATIONS: readonly Observer[] = [
  { latitudeDeg: 48, longitudeDeg: 11.3, heightM: 560 },
  { latitudeDeg: 0, longitudeDeg: -52, heightM: 30 },
  { latitudeDeg: 78, longitudeDeg: 16, heightM: 450 },
];

/** A horizon of hills: 36 knots between 0 and 15 deg, rough enough to split passes. */
const hills = (): [number, number][] => {
  const next = seededNumbers(36);
  return Array.from({ length: 36 }, (_, index) => [index * 10, Math.round(next() * 150) / 10]);
};

export const PROOF_MASKS: readonly HorizonMask[] = [0, 5, 10, hills()];
