import { directionOnAxes, faceAxes } from '../array/face-geometry.ts';
import { linkBudget, LINEAR_ON_CIRCULAR_DB, type LinkBudget } from '../link/budget.ts';
import { typicalWeather } from '../link/weather.ts';
import { lookAnglesOf, stateAt } from '../orbit/track.ts';
import { DAY_MS, intersect, type Interval } from '../time.ts';
import { unit } from '../vector.ts';
import type {
  ClosureModel,
  DayModel,
  Direction,
  FaceModel,
  PassModel,
  RadioLinkModel,
  SatelliteModel,
} from './model.ts';
import { fitsPolarisation, radioFor } from './radio-fit.ts';

/** Least margin a mission's windows keep, dB: what its lines at this station ask, the loosest of them; else 0. */
export function marginFloorDb(day: DayModel, missionId: string): number {
  const lines = day.requirements.filter(
    (line) =>
      line.missionId === missionId &&
      (line.stationId === null || line.stationId === day.station.id),
  );
  return lines.length === 0 ? 0 : Math.min(...lines.map((line) => line.marginFloorDb ?? 0));
}

/** Loss on the worst channel of a face that fits the radio: a window holds for whichever of them is taken. */
export function polarisationLossDb(
  day: DayModel,
  face: FaceModel,
  direction: Direction,
  radio: RadioLinkModel,
): number {
  const fitting = day.channels.filter(
    (channel) =>
      channel.faceId === face.id &&
      channel.direction === direction &&
      fitsPolarisation(channel.polarisation, radio.polarisation),
  );
  const crossed = fitting.some(
    (channel) => (channel.polarisation === 'linear') !== (radio.polarisation === 'linear'),
  );
  return crossed ? LINEAR_ON_CIRCULAR_DB : 0;
}

export interface PassLink {
  pass: PassModel;
  budgetAt: (ms: number) => LinkBudget;
}

/** Makes the budgets of passes over one face and direction; what does not depend on the pass is made once a satellite. */
export function passLinks(
  day: DayModel,
  face: FaceModel,
  direction: Direction,
): (satellite: SatelliteModel, pass: PassModel) => PassLink | null {
  const weather = typicalWeather(day.station.latitudeDeg, day.station.heightM);
  const axes = faceAxes(face);
  const made = new Map<string, ReturnType<typeof linkBudget>>();
  return (satellite, pass) => {
    const radio = radioFor(satellite, direction);
    const farEndDb =
      direction === 'receive' ? satellite.downlink.eirpDbw : satellite.uplink?.gOverTDbK;
    if (!radio || farEndDb === undefined) return null;
    const lossDb = polarisationLossDb(day, face, direction, radio);
    const setting = { face, direction, radio, farEndDb, weather, polarisationLossDb: lossDb };
    const budget = made.get(satellite.id) ?? linkBudget(setting);
    made.set(satellite.id, budget);
    return {
      pass,
      budgetAt: (ms) => {
        const state = stateAt(pass.track, ms);
        const { rangeKm, elevationDeg } = lookAnglesOf(state);
        const towards = unit([state.eastKm, state.northKm, state.upKm]);
        const { scanAngleRad } = directionOnAxes(axes, towards);
        const ageDays = (ms - (pass.elementEpochMs ?? ms)) / DAY_MS;
        return budget({ rangeKm, elevationDeg, scanAngleRad, ageDays });
      },
    };
  };
}

/** Closures that only weaken a face in a direction: of the face or of its whole station. */
export const reductionsOf = (
  day: DayModel,
  face: FaceModel,
  direction: Direction,
): ClosureModel[] =>
  day.closures.filter(
    (closure) =>
      closure.reducedByDb !== null &&
      (closure.direction === 'both' || closure.direction === direction) &&
      ((closure.scope === 'face' && closure.scopeId === face.id) ||
        (closure.scope === 'station' && closure.scopeId === day.station.id)),
  );

/** An interval cut where reductions begin and end, each part with the loss that holds in it. */
export function reducedParts(
  interval: Interval,
  reductions: readonly ClosureModel[],
): (Interval & { lossDb: number })[] {
  const edges = reductions
    .flatMap(({ fromMs, toMs }) => [fromMs, toMs ?? interval.toMs])
    .filter((ms) => ms > interval.fromMs && ms < interval.toMs);
  const cuts = [interval.fromMs, ...[...new Set(edges)].sort((a, b) => a - b), interval.toMs];
  return cuts.slice(1).map((toMs, index) => {
    const part = { fromMs: cuts[index] ?? NaN, toMs };
    const losses = reductions.map((closure) =>
      intersect(part, { fromMs: closure.fromMs, toMs: closure.toMs ?? Infinity })
        ? (closure.reducedByDb ?? 0)
        : 0,
    );
    return { ...part, lossDb: losses.reduce((sum, loss) => sum + loss, 0) };
  });
}
