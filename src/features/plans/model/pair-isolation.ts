import { faceAxes } from '../../../../shared/array/face-geometry.ts';
import type { Track } from '../../../../shared/orbit/track.ts';
import {
  carrierToInterferenceDb,
  requiredCOverIDb,
  signalOf,
  signalStateAt,
  type Signal,
} from '../../../../shared/schedule/facts/beam-signals.ts';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';

/** A receive beam as the rule of close beams judges it. */
export interface ReceiveBeam {
  contact: Contact;
  satellite: Satellite;
  track: Track;
}
/** C/I of the one that is worse off, by the other alone, and what it needs. */
export interface Isolation {
  db: number;
  neededDb: number;
}

// Tapers and patterns are the costly part; a track stands for one prediction of one satellite.
const signals = new WeakMap<Track, Map<string, Signal | null>>();

function signalFor(face: Face, { contact, satellite, track }: ReceiveBeam): Signal | null {
  const key = `${face.id} ${face.version} ${satellite.version}`;
  const known = signals.get(track) ?? new Map<string, Signal | null>();
  signals.set(track, known);
  const found = known.get(key);
  if (found !== undefined) return found;
  const made = signalOf(face, 'receive', satellite, {
    id: contact.passId,
    predictionId: contact.passId,
    satelliteId: satellite.id,
    missionId: contact.missionId,
    fromMs: Date.parse(contact.receive.fromUtc),
    toMs: Date.parse(contact.receive.toUtc),
    tcaMs: Date.parse(contact.receive.fromUtc),
    maxElevationDeg: contact.maxElevationDeg,
    track,
  });
  known.set(key, made);
  return made;
}

/** Isolation of two receive beams of a face over time; null where one of them has no radio. */
export function isolationOf(
  face: Face,
  a: ReceiveBeam,
  b: ReceiveBeam,
): ((ms: number) => Isolation) | null {
  const [one, other] = [signalFor(face, a), signalFor(face, b)];
  if (!one || !other) return null;
  const axes = faceAxes(face);
  const [stateOfOne, stateOfOther] = [
    signalStateAt(axes, 'receive', one),
    signalStateAt(axes, 'receive', other),
  ];
  const [needOne, needOther] = [
    requiredCOverIDb(face, a.satellite),
    requiredCOverIDb(face, b.satellite),
  ];
  return (ms) => {
    const first = { signal: one, state: stateOfOne(ms) };
    const second = { signal: other, state: stateOfOther(ms) };
    const ratioOne = carrierToInterferenceDb('receive', first, second);
    const ratioOther = carrierToInterferenceDb('receive', second, first);
    return ratioOne - needOne <= ratioOther - needOther
      ? { db: ratioOne, neededDb: needOne }
      : { db: ratioOther, neededDb: needOther };
  };
}
