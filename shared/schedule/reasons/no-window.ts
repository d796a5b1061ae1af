import { faceAxes } from '../../array/face-geometry.ts';
import { scanLossDb } from '../../array/scan-loss.ts';
import { toDegrees } from '../../units.ts';
import { dot } from '../../vector.ts';
import type { PlanContext } from '../context.ts';
import { samplePass, type SampledPass } from '../facts/sampling.ts';
import type { FaceModel, PassModel, SatelliteModel } from '../model.ts';
import { fitsBand } from '../radio-fit.ts';
import { scanLossLimitDb } from '../scan-limits.ts';
import { decimals } from '../words.ts';
import { reason, type PassReason } from './why-not.ts';

/** The least scan loss the pass reaches on a face above the receive floor, dB; null: never in front of it. */
function leastLossDb(context: PlanContext, sampled: SampledPass, face: FaceModel): number | null {
  const { normal } = faceAxes(face);
  const sine = Math.sin((context.day.station.receiveElevationFloorDeg * Math.PI) / 180);
  let least: number | null = null;
  for (const s of sampled.directions) {
    if (s[2] < sine) continue;
    const loss = scanLossDb(face, Math.acos(Math.min(1, dot(s, normal))));
    if (loss !== null && (least === null || loss < least)) least = loss;
  }
  return least;
}

/** Why a pass has no usable window at all: too low, too far off every face, or no band. */
export function whyNoWindow(
  context: PlanContext,
  pass: PassModel,
  satellite: SatelliteModel,
): PassReason[] {
  const { station, faces } = context.day;
  const fitting = faces.filter((face) => fitsBand(face, 'receive', satellite.downlink));
  if (fitting.length === 0)
    return [
      reason(
        'channel-unfit',
        `No face receives ${satellite.downlink.frequencyMhz} MHz, the downlink of ${satellite.name}.`,
        {
          value: satellite.downlink.frequencyMhz,
          unit: 'MHz',
        },
      ),
    ];
  const sampled = samplePass(pass);
  const highestDeg = toDegrees(
    Math.asin(Math.max(...sampled.directions.map((s) => Math.min(1, s[2])))),
  );
  if (highestDeg < station.receiveElevationFloorDeg)
    return [
      reason(
        'outside-window',
        `${satellite.name} reaches ${decimals(highestDeg, 1)} deg only; the receive floor is ${station.receiveElevationFloorDeg} deg.`,
        {
          value: highestDeg,
          limit: station.receiveElevationFloorDeg,
          unit: 'deg',
        },
      ),
    ];
  const limitDb = scanLossLimitDb(context.day, pass.missionId);
  const losses = fitting.flatMap((face) => {
    const loss = leastLossDb(context, sampled, face);
    return loss === null ? [] : [{ face, loss }];
  });
  const best = losses.toSorted((a, b) => a.loss - b.loss)[0];
  if (!best)
    return [
      reason(
        'outside-window',
        `${satellite.name} passes behind every face that receives its band.`,
      ),
    ];
  const beyond = best.loss > best.face.hardEndDb;
  const allowed = beyond ? best.face.hardEndDb : limitDb;
  return [
    reason(
      beyond ? 'hard-end' : 'outside-window',
      `${satellite.name} comes no nearer than ${decimals(best.loss, 2)} dB of scan loss on ${best.face.label}; ${beyond ? 'its hard end is' : 'the limit is'} ${decimals(allowed, 2)} dB.`,
      { value: best.loss, limit: allowed, unit: 'dB' },
    ),
  ];
}
