import { OrbitInputError } from './input-error.ts';
import { trackOf } from './make-track.ts';
import { horizonFrame } from './observer.ts';
import type { PassQuery, PassSearchResult, PredictedPass } from './pass.ts';
import { searchPasses } from './pass-search.ts';
import { makeOrbit, type ElementLines } from './propagation.ts';
import type { Track } from './track.ts';

export interface PassWithTrack extends PredictedPass {
  track: Track;
}

export interface SatellitePrediction extends Omit<PassSearchResult, 'passes'> {
  passes: PassWithTrack[];
}

/** A satellite of a batch: its prediction, or the field of its elements that cannot be used. */
export type BatchItem<Id> =
  | { id: Id; prediction: SatellitePrediction }
  | { id: Id; refused: { field: string; message: string } };

/** The passes of one satellite with their tracks. Throws as `searchPasses`. */
export function predictSatellite(query: PassQuery): SatellitePrediction {
  const found = searchPasses(query);
  const [orbit, frame] = [makeOrbit(query.elements), horizonFrame(query.observer)];
  const passes = found.passes.map((pass) => ({
    ...pass,
    track: trackOf(orbit, frame, pass.aosMs, pass.losMs),
  }));
  return { ...found, passes };
}

/**
 * Predicts satellites one by one, so that a worker can report progress and stop between two of them. Each result depends
 * on its own satellite only: it is the same whatever the order or the number of workers. A satellite whose elements
 * cannot be used does not stop the others; a wrong window, observer or mask throws, because no satellite could be used.
 */
export function* predictBatch<Id>(
  satellites: Iterable<{ id: Id; elements: ElementLines }>,
  query: Omit<PassQuery, 'elements'>,
): Generator<BatchItem<Id>> {
  for (const { id, elements } of satellites) {
    try {
      yield { id, prediction: predictSatellite({ ...query, elements }) };
    } catch (error) {
      if (!(error instanceof OrbitInputError) || !error.field.startsWith('elements')) throw error;
      yield { id, refused: { field: error.field, message: error.message } };
    }
  }
}
