import { useQueries } from '@tanstack/react-query';
import { useMemo } from 'react';
import { directionAt, type Track } from '../../../../shared/orbit/track.ts';
import { areCoFrequency } from '../../../../shared/schedule/radio-fit.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { intersect, type Interval } from '../../../../shared/time.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { angleBetween } from '../../../../shared/vector.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { isolationOf, type ReceiveBeam } from '../model/pair-isolation.ts';
import { legInterval, openContact } from '../model/plan-legs.ts';
import { usePlanDesk } from './plan-desk.ts';

/** A beam on the same face and frequency at the same time. */
export interface Neighbour {
  contact: Contact;
  /** Isolation, dB, every 5 s of the common time. */
  points: { ms: number; value: number }[];
  leastDb: number;
  neededDb: number;
  leastAtMs: number;
  /** Angle between the two at the worst instant. */
  apartDeg: number;
}

const STEP_MS = 5000;

function neighbourOf(
  face: Face,
  [own, other]: readonly [ReceiveBeam, ReceiveBeam],
  common: Interval,
): Neighbour | null {
  const isolation = isolationOf(face, own, other);
  if (!isolation) return null;
  const points: Neighbour['points'] = [];
  let worst = { ms: common.fromMs, ...isolation(common.fromMs) };
  for (let ms = common.fromMs; ms <= common.toMs; ms += STEP_MS) {
    const now = isolation(ms);
    points.push({ ms, value: now.db });
    if (now.db - now.neededDb < worst.db - worst.neededDb) worst = { ms, ...now };
  }
  const apart = angleBetween(directionAt(own.track, worst.ms), directionAt(other.track, worst.ms));
  return {
    contact: other.contact,
    points,
    leastDb: worst.db,
    neededDb: worst.neededDb,
    leastAtMs: worst.ms,
    apartDeg: toDegrees(apart),
  };
}

interface Beside {
  contact: Contact;
  satellite: Satellite;
  common: Interval;
}

/** Contacts whose beams stand beside a contact's own on one frequency. */
function useBeside(contact: Contact): Beside[] {
  const { plan, satellites } = usePlanDesk();
  return useMemo(() => {
    const own = satellites.get(contact.satelliteId);
    if (!own) return [];
    const interval = legInterval(contact.receive);
    return plan.contacts.flatMap((one): Beside[] => {
      const other = openContact(one);
      const satellite = other && satellites.get(other.satelliteId);
      if (!other || !satellite || other.id === contact.id || other.faceId !== contact.faceId)
        return [];
      const common = intersect(interval, legInterval(other.receive));
      return common && areCoFrequency(own.downlink, satellite.downlink)
        ? [{ contact: other, satellite, common }]
        : [];
    });
  }, [contact, plan.contacts, satellites]);
}

/** Receive beams beside a contact's own, the tightest first, judged as the rule judges them. */
export function useNeighbours(contact: Contact): Neighbour[] {
  const { faces, satellites } = usePlanDesk();
  const beside = useBeside(contact);
  const tracks = useQueries({
    queries: [contact, ...beside.map((one) => one.contact)].map(({ passId }) =>
      passQueries.track(passId),
    ),
    combine: (results): (Track | undefined)[] => results.map(({ data }) => data),
  });
  return useMemo(() => {
    const face = faces.find(({ id }) => id === contact.faceId);
    const satellite = satellites.get(contact.satelliteId);
    const track = tracks[0];
    if (!face || !satellite || !track) return [];
    const own = { contact, satellite, track };
    const neighbours = beside.flatMap(({ common, ...other }, index) => {
      const otherTrack = tracks[index + 1];
      const beam = otherTrack && { ...other, track: otherTrack };
      return (beam && neighbourOf(face, [own, beam], common)) ?? [];
    });
    return neighbours.sort((a, b) => a.leastDb - a.neededDb - (b.leastDb - b.neededDb));
  }, [contact, faces, satellites, beside, tracks]);
}
