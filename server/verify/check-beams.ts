import { halfPowerBeamwidthU } from '../../shared/array/beamwidth.ts';
import { directionOnFace } from '../../shared/array/face-geometry.ts';
import { directionAt } from '../../shared/orbit/track.ts';
import type { FaceModel, RadioLinkModel, Violation } from '../../shared/schedule/model.ts';
import { secondsOf } from './check-sight.ts';
import { finding } from './finding.ts';
import type { Suspect } from './legs.ts';

const radioOf = ({ satellite, direction }: Suspect): RadioLinkModel | null =>
  (direction === 'receive' ? satellite?.downlink : satellite?.uplink) ?? null;

function canDisturb(a: RadioLinkModel, b: RadioLinkModel): boolean {
  const circular = new Set([a.polarisation, b.polarisation]);
  if (circular.has('rhcp') && circular.has('lhcp')) return false;
  const lower = Math.max(
    a.frequencyMhz - a.bandwidthKhz / 2e3,
    b.frequencyMhz - b.bandwidthKhz / 2e3,
  );
  const upper = Math.min(
    a.frequencyMhz + a.bandwidthKhz / 2e3,
    b.frequencyMhz + b.bandwidthKhz / 2e3,
  );
  return upper - lower > 1e-9;
}

/** Separation in half-power beamwidths at an instant and what is needed of it. */
function separation(face: FaceModel, a: Suspect, b: Suspect, mhz: number): (ms: number) => number {
  const taper = a.direction === 'receive' ? face.receiveTaper : face.transmitTaper;
  const widthU = halfPowerBeamwidthU(
    { elements: face.elementsX, pitchMm: face.pitchXMm, taper },
    mhz,
  );
  const widthV = halfPowerBeamwidthU(
    { elements: face.elementsY, pitchMm: face.pitchYMm, taper },
    mhz,
  );
  return (ms) => {
    if (!a.pass || !b.pass) return Infinity;
    const one = directionOnFace(face, directionAt(a.pass.track, ms));
    const other = directionOnFace(face, directionAt(b.pass.track, ms));
    return Math.hypot((one.u - other.u) / widthU, (one.v - other.v) / widthV);
  };
}

function checkPair(face: FaceModel, a: Suspect, b: Suspect): Violation[] {
  const [radioA, radioB] = [radioOf(a), radioOf(b)];
  if (!a.pass || !b.pass || !radioA || !radioB || !canDisturb(radioA, radioB)) return [];
  const fromMs = Math.max(a.leg.fromMs, b.leg.fromMs, a.pass.fromMs, b.pass.fromMs);
  const toMs = Math.min(a.leg.toMs, b.leg.toMs, a.pass.toMs, b.pass.toMs);
  if (fromMs >= toMs) return [];
  const taper = a.direction === 'receive' ? face.receiveTaper : face.transmitTaper;
  const needed = taper.kind === 'taylor' ? 1.25 : 3;
  const apart = separation(face, a, b, Math.min(radioA.frequencyMhz, radioB.frequencyMhz));
  // The last instant of a half-open interval is just before its end.
  const close = secondsOf(fromMs, toMs - 1).filter((ms) => apart(ms) < needed - 1e-6);
  const [first, last] = [close[0], close.at(-1)];
  if (first === undefined || last === undefined) return [];
  return [finding('beams-too-close', 'beams too close', [a, b], first, last + 1)];
}

/** Co-frequency beams of a face and direction, every second in which both are on. */
export function checkBeams(suspects: readonly Suspect[]): Violation[] {
  const found: Violation[] = [];
  for (const [index, a] of suspects.entries())
    for (const b of suspects.slice(index + 1)) {
      const apart = a.leg.toMs <= b.leg.fromMs || b.leg.toMs <= a.leg.fromMs;
      if (apart || (!a.own && !b.own) || a.direction !== b.direction) continue;
      if (a.contact.satelliteId === b.contact.satelliteId) continue;
      if (a.contact.faceId !== b.contact.faceId || !a.face) continue;
      found.push(...checkPair(a.face, a, b));
    }
  return found;
}
