import { useMemo } from 'react';
import { directionFromFace, faceAxes } from '../../../../shared/array/face-geometry.ts';
import { subsatelliteAt } from '../../../../shared/orbit/subsatellite.ts';
import type { Track } from '../../../../shared/orbit/track.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import type { Interval } from '../../../../shared/time.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { arcAtElevation, destination, type GroundPoint } from '../model/station-projection.ts';
import { usePlanDesk } from './plan-desk.ts';
import type { SkyBeam, SkyInstant } from './use-sky-instant.ts';

/** The same instant as the sky, seen from above. */
export interface MapBeam {
  beam: SkyBeam;
  at: GroundPoint;
  heightKm: number;
  /** Half-power footprint at the satellite's height. */
  footprint: GroundPoint[];
}
export interface MapIdle {
  passId: string;
  name: string;
  missionId: string;
  at: GroundPoint;
}
export interface MapTrack {
  id: string;
  color: string | null;
  path: GroundPoint[];
  contacts: GroundPoint[][];
}

const STEP_MS = 20_000;

const pathOf = (track: Track, station: Station, { fromMs, toMs }: Interval): GroundPoint[] => {
  const path: GroundPoint[] = [];
  for (let ms = fromMs; ms < toMs; ms += STEP_MS) path.push(subsatelliteAt(track, station, ms));
  path.push(subsatelliteAt(track, station, toMs));
  return path;
};

/** The half-power circle of the u-v plane, where it meets the sphere of the satellite's height. */
function footprintOf(
  { face, u, v, widths }: SkyBeam,
  station: Station,
  heightKm: number,
): GroundPoint[] {
  const axes = faceAxes(face);
  return Array.from({ length: 48 }, (_, i) => {
    const turn = (i * Math.PI) / 24;
    return directionFromFace(axes, u + widths.u * Math.cos(turn), v + widths.v * Math.sin(turn));
  }).flatMap((direction) => {
    if (!direction) return [];
    const [east, north, up] = direction;
    const elevationDeg = Math.max(0, toDegrees(Math.atan2(up, Math.hypot(east, north))));
    return [destination(station, arcAtElevation(elevationDeg, heightKm), Math.atan2(east, north))];
  });
}

export function useMapInstant(sky: SkyInstant, instantMs: number) {
  const { station } = usePlanDesk();
  const tracks = useMemo(
    (): MapTrack[] =>
      sky.tracks.map(({ id, color, track, contacts, fromMs, toMs }) => ({
        id,
        color,
        path: pathOf(track, station, { fromMs, toMs }),
        contacts: contacts.map((contact) => pathOf(track, station, contact)),
      })),
    [sky.tracks, station],
  );
  const beams = sky.beams.map((beam): MapBeam => {
    const at = subsatelliteAt(beam.track, station, instantMs);
    return { beam, at, heightKm: at.heightKm, footprint: footprintOf(beam, station, at.heightKm) };
  });
  const idle = sky.idle.map(({ pass, track }): MapIdle => ({
    passId: pass.id,
    name: pass.satelliteName,
    missionId: pass.missionId,
    at: subsatelliteAt(track, station, instantMs),
  }));
  return { tracks, beams, idle };
}
