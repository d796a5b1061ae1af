/**
 * The one door by which outside checks reach the computation. It only translates and calls product code; one import a
 * door.
 */
import { solveBeamAssign, type BeamAssignInstance } from '../../server/solver/beam-assign.ts';
import { readElementSets } from '../../shared/orbit/element-reader.ts';
import { searchPasses } from '../../shared/orbit/pass-search.ts';
import { fromIso, toIso } from '../../shared/time.ts';

interface PassInputs {
  line1: string;
  line2: string;
  latitudeDeg: number;
  longitudeDeg: number;
  heightM: number;
  fromUtc: string;
  toUtc: string;
  maskDeg: number | [number, number][];
}

export function passes(inputs: PassInputs): { items: object[]; sgp4Calls: number } {
  const { line1, line2, latitudeDeg, longitudeDeg, heightM, maskDeg } = inputs;
  const result = searchPasses({
    elements: { line1, line2 },
    observer: { latitudeDeg, longitudeDeg, heightM },
    mask: maskDeg,
    fromMs: fromIso(inputs.fromUtc),
    toMs: fromIso(inputs.toUtc),
  });
  const items = result.passes.map((pass) => ({
    aosUtc: toIso(pass.aosMs),
    tcaUtc: toIso(pass.tcaMs),
    losUtc: toIso(pass.losMs),
    maxElevationDeg: pass.maxElevationDeg,
    azimuthAosDeg: pass.aosAzimuthDeg,
    azimuthTcaDeg: pass.tcaAzimuthDeg,
    azimuthLosDeg: pass.losAzimuthDeg,
    rangeTcaKm: pass.tcaRangeKm,
  }));
  return { items, sgp4Calls: result.sgp4Calls };
}

export { readElementSets };
export { quantity } from './quantities/quantity.ts';

/** Assignment instances of the plain format `beam-assign/1`. */
export const solve = (
  instance: BeamAssignInstance,
  { timeLimitSeconds }: { timeLimitSeconds: number },
): Promise<{
  objective: number;
  bound: number | null;
  gap: number | null;
  windows: string[];
}> =>
  solveBeamAssign(instance, timeLimitSeconds, {
    now: () => performance.now(),
    shouldStop: () => false,
    onIncumbent: () => undefined,
  });
