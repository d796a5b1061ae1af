import { useQueries } from '@tanstack/react-query';
import { useMemo } from 'react';
import {
  directionAt,
  lookAnglesAt,
  type LookAngles,
  type Track,
} from '../../../../shared/orbit/track.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import type { Pass } from '../../../../shared/schemas/pass.ts';
import { directionOnAxes, faceAxes } from '../../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../../shared/array/scan-loss.ts';
import { MINUTE_MS, overlaps, type Interval } from '../../../../shared/time.ts';
import type { Vector3 } from '../../../../shared/vector.ts';
import { beamWidths, type BeamWidths } from '../../../charts/beam-outline.ts';
import type { SkyTrack } from '../../../charts/track-path.ts';
import { isSecondForm, seriesColor } from '../../../lib/series.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { legInterval, openContact } from '../model/plan-legs.ts';
import { usePlanDesk } from './plan-desk.ts';

/** One receive beam at the instant. */
export interface SkyBeam {
  contact: Contact;
  face: Face;
  color: string;
  track: Track;
  direction: Vector3;
  look: LookAngles;
  lossDb: number | null;
  u: number;
  v: number;
  widths: BeamWidths;
  transmits: boolean;
}
/** A satellite above the mask without a contact at the instant. */
export interface SkyIdle {
  pass: Pass;
  track: Track;
}
export interface SkyInstant {
  beams: SkyBeam[];
  idle: SkyIdle[];
  tracks: SkyTrack[];
  receiveBeams: number;
  transmitBeams: number;
  /** Why tracks are missing, when they could not be read. */
  error: Error | null;
}

const AHEAD_MS = 12 * MINUTE_MS;

interface Known {
  pass: Pass;
  interval: Interval;
  contacts: Contact[];
  track: Track;
  sky: SkyTrack;
}

/** Passes around an instant with their tracks; those that rise soon are fetched ahead, so that the sky plays. */
function usePassesAround(instantMs: number): { known: Known[]; error: Error | null } {
  const { passes, plan, missions } = usePlanDesk();
  // Steps of minutes: the list must not change with every frame.
  const minute = Math.floor(instantMs / MINUTE_MS) * MINUTE_MS;
  const near = useMemo(() => {
    const around = { fromMs: minute - MINUTE_MS, toMs: minute + AHEAD_MS };
    return [...passes.values()].flatMap((pass) => {
      const interval = { fromMs: Date.parse(pass.aosUtc), toMs: Date.parse(pass.losUtc) };
      return overlaps(interval, around) ? [{ pass, interval }] : [];
    });
  }, [passes, minute]);
  const tracks = useQueries({
    queries: near.map(({ pass }) => passQueries.track(pass.id)),
    combine: (results) => ({
      list: results.map(({ data }) => data),
      error: results.find((result) => result.error)?.error ?? null,
    }),
  });
  return useMemo(
    () => ({
      error: tracks.error,
      known: near.flatMap(({ pass, interval }, index) => {
        const track = tracks.list[index];
        if (!track) return [];
        const contacts = plan.contacts
          .flatMap((one) => openContact(one) ?? [])
          .filter(({ passId }) => passId === pass.id);
        const series = missions.series(pass.missionId);
        const sky: SkyTrack = {
          ...interval,
          id: pass.id,
          track,
          color: contacts.length > 0 && series !== null ? seriesColor(series) : null,
          dashed: series !== null && isSecondForm(series),
          contacts: contacts.map(({ receive }) => legInterval(receive)),
        };
        return [{ pass, interval, contacts, track, sky }];
      }),
    }),
    [near, tracks, plan.contacts, missions],
  );
}

export function useSkyInstant(instantMs: number): SkyInstant {
  const { faces, satellites, legs, missions } = usePlanDesk();
  const { known, error } = usePassesAround(instantMs);
  const at = (interval: Interval): boolean =>
    interval.fromMs <= instantMs && instantMs < interval.toMs;
  const up = known.filter(({ interval }) => at(interval));
  const beams: SkyBeam[] = [];
  const idle: SkyIdle[] = [];
  for (const { pass, contacts, track } of up) {
    const contact = contacts.find(({ receive }) => at(legInterval(receive)));
    const face = contact && faces.find(({ id }) => id === contact.faceId);
    const radio = satellites.get(pass.satelliteId)?.downlink;
    if (!contact || !face || !radio) {
      idle.push({ pass, track });
      continue;
    }
    const direction = directionAt(track, instantMs);
    const onFace = directionOnAxes(faceAxes(face), direction);
    const series = missions.series(contact.missionId);
    beams.push({
      contact,
      face,
      track,
      direction,
      color: series === null ? 'var(--ink-faint)' : seriesColor(series),
      look: lookAnglesAt(track, instantMs),
      lossDb: scanLossDb(face, onFace.scanAngleRad),
      u: onFace.u,
      v: onFace.v,
      widths: beamWidths(face, 'receive', radio.frequencyMhz),
      transmits: contact.transmit !== null && at(legInterval(contact.transmit)),
    });
  }
  const count = (direction: 'receive' | 'transmit'): number =>
    legs.filter((leg) => leg.direction === direction && at(leg)).length;
  return {
    beams,
    idle,
    tracks: up.map(({ sky }) => sky),
    receiveBeams: count('receive'),
    transmitBeams: count('transmit'),
    error,
  };
}
