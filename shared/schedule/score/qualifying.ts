import { faceAxes } from '../../array/face-geometry.ts';
import { intersect, MINUTE_MS, SECOND_MS, type Interval } from '../../time.ts';
import { toRadians } from '../../units.ts';
import { samplePass, whereDirectionHolds } from '../facts/sampling.ts';
import { scanCondition } from '../facts/sight.ts';
import { intersectAll, totalMs } from '../intervals.ts';
import type { ContactModel, DayModel, FaceModel, PassModel, RequirementModel } from '../model.ts';
import { largestScanRad } from '../scan-limits.ts';
import { inHours } from './hours.ts';

/** What of a contact serves a requirement line. */
export interface Served {
  /** Downlink time within the line's own elevation and scan-loss limits, ms. */
  receiveMs: number;
  /** It is long enough, in hours and has the uplink asked for: it counts. */
  counts: boolean;
}

const NOTHING: Served = { receiveMs: 0, counts: false };
type ServedContact = Pick<ContactModel, 'passId' | 'faceId' | 'receive' | 'transmit'>;

/** The parts of a pass on a face that a line accepts; null: all of it. */
function acceptedParts(
  line: RequirementModel,
  limitOfDayDb: number,
  pass: PassModel,
  face: FaceModel,
): Interval[] | null {
  const { minimumElevationDeg, scanLossLimitDb } = line;
  const strict = scanLossLimitDb !== null && scanLossLimitDb < limitOfDayDb;
  if (minimumElevationDeg === null && !strict) return null;
  const sampled = samplePass(pass);
  let parts: Interval[] = [{ fromMs: pass.fromMs, toMs: pass.toMs }];
  if (minimumElevationDeg !== null) {
    const sine = Math.sin(toRadians(minimumElevationDeg));
    parts = intersectAll(
      parts,
      whereDirectionHolds((s) => s[2] - sine, sampled),
    );
  }
  if (strict) {
    const within = scanCondition(
      faceAxes(face).normal,
      largestScanRad(face, 'receive', scanLossLimitDb),
    );
    parts = intersectAll(parts, whereDirectionHolds(within, sampled));
  }
  return parts;
}

function hasUplink(line: RequirementModel, contact: ServedContact): boolean {
  if (line.uplink !== 'required') return true;
  const { transmit } = contact;
  const leastMs = Math.max(SECOND_MS, (line.leastUplinkMinutes ?? 0) * MINUTE_MS);
  return transmit !== null && transmit.toMs - transmit.fromMs >= leastMs;
}

/** How contacts of this day serve requirement lines; remembers what it had to compute from tracks. */
export function makeQualifier(
  day: Pick<DayModel, 'passes' | 'faces' | 'limitOfDayDb'>,
): (line: RequirementModel, contact: ServedContact) => Served {
  const passes = new Map(day.passes.map((pass) => [pass.id, pass]));
  const faces = new Map(day.faces.map((face) => [face.id, face]));
  const known = new Map<string, Interval[] | null>();
  const parts = (line: RequirementModel, contact: ServedContact): Interval[] | null => {
    const key = `${line.id}|${contact.passId}|${contact.faceId}`;
    const [pass, face] = [passes.get(contact.passId), faces.get(contact.faceId)];
    if (!pass || !face) return null;
    if (!known.has(key)) known.set(key, acceptedParts(line, day.limitOfDayDb, pass, face));
    return known.get(key) ?? null;
  };
  return (line, contact) => {
    if (!inHours(line, contact.receive.fromMs)) return NOTHING;
    const accepted = parts(line, contact);
    const receiveMs = accepted
      ? totalMs(accepted.flatMap((part) => intersect(part, contact.receive) ?? []))
      : contact.receive.toMs - contact.receive.fromMs;
    const longEnough = receiveMs >= Math.max(1, line.minimumDurationSeconds * SECOND_MS);
    const counts = longEnough && hasUplink(line, contact);
    return counts ? { receiveMs, counts } : NOTHING;
  };
}
