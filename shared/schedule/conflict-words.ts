import type { ConflictInterval } from './model.ts';
import { decimals } from './words.ts';

/** By how much a pair is too close, as part of a sentence: decibels where they are known, else beamwidths. */
export function closenessWords(conflict: ConflictInterval): string {
  const { isolationDb, requiredDb, separationHpbw, requiredHpbw } = conflict;
  const apart = `${decimals(separationHpbw, 2)} half-power beamwidths`;
  if (isolationDb === null || requiredDb === null)
    return `${apart} where ${decimals(requiredHpbw, 2)} are needed`;
  const shortDb = decimals(requiredDb - isolationDb, 1);
  return (
    `C/I ${decimals(isolationDb, 1)} dB where ${decimals(requiredDb, 1)} dB are needed ` +
    `(${shortDb} dB short), ${apart} apart`
  );
}
