import { useQueries } from '@tanstack/react-query';
import { useMemo } from 'react';
import { faceAxes, type FaceAxes } from '../../../../shared/array/face-geometry.ts';
import { requiredHpbw } from '../../../../shared/schedule/facts/separation.ts';
import { areCoFrequency } from '../../../../shared/schedule/radio-fit.ts';
import { directionAt, type Track } from '../../../../shared/orbit/track.ts';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import { intersect, type Interval } from '../../../../shared/time.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { angleBetween, dot } from '../../../../shared/vector.ts';
import { beamWidths, type BeamWidths } from '../../../charts/beam-outline.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { legInterval, openContact } from '../model/plan-legs.ts';
import { usePlanDesk } from './plan-desk.ts';

/** A beam on the same face and frequency at the same time. */
export interface Neighbour {
  contact: Contact;
  common: Interval;
  /** Separation in half-power beamwidths, every 5 s of the common time. */
  points: { ms: number; value: number }[];
  leastHpbw: number;
  leastDeg: number;
  leastAtMs: number;
}

const STEP_MS = 5000;

interface Beam {
  axes: FaceAxes;
  half: BeamWidths;
}

function neighbourOf(
  contact: Contact,
  { common, beam, own, other }: { common: Interval; beam: Beam; own: Track; other: Track },
): Neighbour {
  const points: { ms: number; value: number }[] = [];
  let [least, at] = [Infinity, common.fromMs];
  for (let ms = common.fromMs; ms <= common.toMs; ms += STEP_MS) {
    const [a, b] = [directionAt(own, ms), directionAt(other, ms)];
    const du = (dot(a, beam.axes.u) - dot(b, beam.axes.u)) / (2 * beam.half.u);
    const dv = (dot(a, beam.axes.v) - dot(b, beam.axes.v)) / (2 * beam.half.v);
    const value = Math.hypot(du, dv);
    points.push({ ms, value });
    if (value < least) [least, at] = [value, ms];
  }
  const apart = angleBetween(directionAt(own, at), directionAt(other, at));
  return { contact, common, points, leastHpbw: least, leastDeg: toDegrees(apart), leastAtMs: at };
}

/** Receive beams beside a contact's own, nearest first, with what the rule asks of them. */
export function useNeighbours(contact: Contact | null): {
  neighbours: Neighbour[];
  neededHpbw: number | null;
  isPending: boolean;
} {
  const { plan, faces, satellites } = usePlanDesk();
  const others = useMemo(() => {
    const own = contact && satellites.get(contact.satelliteId);
    if (!contact || !own) return [];
    const interval = legInterval(contact.receive);
    return plan.contacts.flatMap((one) => {
      const other = openContact(one);
      const radio = other && satellites.get(other.satelliteId)?.downlink;
      if (!other || !radio || other.id === contact.id || other.faceId !== contact.faceId) return [];
      const common = intersect(interval, legInterval(other.receive));
      return common && areCoFrequency(own.downlink, radio) ? [{ other, common }] : [];
    });
  }, [contact, plan.contacts, satellites]);
  const tracks = useQueries({
    queries: [contact, ...others.map(({ other }) => other)].map((one) => ({
      ...passQueries.track(one?.passId ?? ''),
      enabled: one !== null,
    })),
    combine: (results) => ({
      list: results.map(({ data }) => data),
      isPending: results.some(({ isPending }) => isPending),
    }),
  });
  return useMemo(() => {
    const face = faces.find(({ id }) => id === contact?.faceId);
    const radio = contact && satellites.get(contact.satelliteId)?.downlink;
    const own = tracks.list[0];
    if (!face || !radio || !own)
      return { neighbours: [], neededHpbw: null, isPending: tracks.isPending };
    const beam = { axes: faceAxes(face), half: beamWidths(face, 'receive', radio.frequencyMhz) };
    const neighbours = others.flatMap(({ other, common }, index) => {
      const track = tracks.list[index + 1];
      return track ? [neighbourOf(other, { common, beam, own, other: track })] : [];
    });
    return {
      neighbours: neighbours.sort((a, b) => a.leastHpbw - b.leastHpbw),
      neededHpbw: requiredHpbw(face.receiveTaper),
      isPending: tracks.isPending,
    };
  }, [contact, faces, satellites, others, tracks]);
}
