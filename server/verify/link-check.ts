import { directionOnFace } from '../../shared/array/face-geometry.ts';
import { linkBudget, LINEAR_ON_CIRCULAR_DB } from '../../shared/link/budget.ts';
import { typicalWeather } from '../../shared/link/weather.ts';
import { directionAt, lookAnglesAt } from '../../shared/orbit/track.ts';
import type {
  DayModel,
  Direction,
  FaceModel,
  PassModel,
  SatelliteModel,
} from '../../shared/schedule/model.ts';

export interface Looked {
  pass: PassModel;
  face: FaceModel;
  satellite: SatelliteModel;
  direction: Direction;
}

const MS_A_DAY = 86_400_000;

/** Half the power is lost where one end is linear and the other is not, on any channel that could be taken. */
function mismatchDb(day: DayModel, { face, direction }: Looked, polarisation: string): number {
  for (const channel of day.channels) {
    if (channel.faceId !== face.id || channel.direction !== direction) continue;
    const senses = [channel.polarisation, polarisation];
    if (senses.includes('rhcp') && senses.includes('lhcp')) continue;
    if (senses.filter((sense) => sense === 'linear').length === 1) return LINEAR_ON_CIRCULAR_DB;
  }
  return 0;
}

/** What closures take from a face at an instant, dB. */
function reducedDb(day: DayModel, { face, direction }: Looked, ms: number): number {
  let sum = 0;
  for (const { scope, scopeId, direction: closed, fromMs, toMs, reducedByDb } of day.closures) {
    const hits =
      (scope === 'face' && scopeId === face.id) ||
      (scope === 'station' && scopeId === day.station.id);
    if (!hits || (closed !== 'both' && closed !== direction)) continue;
    if (fromMs <= ms && ms < (toMs ?? Infinity)) sum += reducedByDb ?? 0;
  }
  return sum;
}

/** The link margin of a pass over a face, dB, instant by instant; none without a radio: -Infinity. */
export function marginOf(day: DayModel, looked: Looked): (ms: number) => number {
  const { pass, face, satellite, direction } = looked;
  const { downlink, uplink } = satellite;
  const radio = direction === 'receive' ? downlink : uplink;
  const farEndDb = direction === 'receive' ? downlink.eirpDbw : uplink?.gOverTDbK;
  if (!radio || farEndDb === undefined) return () => -Infinity;
  const budget = linkBudget({
    face,
    direction,
    radio,
    farEndDb,
    weather: typicalWeather(day.station.latitudeDeg, day.station.heightM),
    polarisationLossDb: mismatchDb(day, looked, radio.polarisation),
  });
  return (ms) => {
    const { rangeKm, elevationDeg } = lookAnglesAt(pass.track, ms);
    const { scanAngleRad } = directionOnFace(face, directionAt(pass.track, ms));
    const ageDays = (ms - (pass.elementEpochMs ?? ms)) / MS_A_DAY;
    const { marginDb } = budget({ rangeKm, elevationDeg, scanAngleRad, ageDays });
    return marginDb - reducedDb(day, looked, ms);
  };
}
