import { makeOrbit, propagate, type ElementLines } from '../../../shared/orbit/propagation.ts';
import { cross, dot, norm, type Vector3 } from '../../../shared/vector.ts';
import type { ElementSet, ElementSetUpload } from '../../../shared/schemas/element-set.ts';

/** How far a fresh set puts a satellite from where the set in use has it, at one instant. */
export interface MovedSet {
  satelliteId: string;
  catalogNumber: number;
  name: string;
  missionId: string | null;
  epochUtc: string;
  inUseEpochUtc: string;
  /** Along the track, seconds; positive: the satellite comes later. null: one of the two fails at that instant. */
  lateSeconds: number | null;
  crossTrackKm: number | null;
}

/** Along-track shift as time, and the distance across the track, of two sets of one satellite. */
export function shiftBetween(
  before: ElementLines,
  fresh: ElementLines,
  atMs: number,
): { lateSeconds: number; crossTrackKm: number } | null {
  const old = propagate(makeOrbit(before), atMs);
  const next = propagate(makeOrbit(fresh), atMs);
  if (!old || !next) return null;
  const apart: Vector3 = [next.x - old.x, next.y - old.y, next.z - old.z];
  const velocity: Vector3 = [old.vx, old.vy, old.vz];
  const along = dot(apart, velocity) / norm(velocity);
  const acrossAll = norm(cross(apart, velocity)) / norm(velocity);
  // Behind where it was expected means later.
  return { lateSeconds: -along / norm(velocity), crossTrackKm: acrossAll };
}

/** The two element lines of a set whose first line (name or line 1) stands at `line` of the file. */
export function linesAt(fileLines: readonly string[], line: number): ElementLines | null {
  for (let at = line - 1; at < line + 2; at++) {
    const [line1, line2] = [fileLines[at], fileLines[at + 1]];
    if (line1?.startsWith('1 ') && line2?.startsWith('2 ')) return { line1, line2 };
  }
  return null;
}

/** Every accepted set of a file against the set in use, largest shift first. */
export function movedSets(
  upload: ElementSetUpload,
  {
    fileLines,
    inUse,
    atMs,
  }: { fileLines: readonly string[]; inUse: readonly ElementSet[]; atMs: number },
): MovedSet[] {
  const bySatellite = new Map(inUse.map((set) => [set.satelliteId, set]));
  const moved = upload.accepted.flatMap((set): MovedSet[] => {
    const before = bySatellite.get(set.satelliteId);
    const lines = linesAt(fileLines, set.line);
    if (!before || !lines || set.unchanged || set.satelliteId === null) return [];
    const shift = shiftBetween(before, lines, atMs);
    return [
      {
        satelliteId: set.satelliteId,
        catalogNumber: set.catalogNumber,
        name: before.satelliteName ?? set.name ?? String(set.catalogNumber),
        missionId: before.missionId,
        epochUtc: set.epochUtc,
        inUseEpochUtc: before.epochUtc,
        lateSeconds: shift?.lateSeconds ?? null,
        crossTrackKm: shift?.crossTrackKm ?? null,
      },
    ];
  });
  return moved.sort((a, b) => Math.abs(b.lateSeconds ?? 0) - Math.abs(a.lateSeconds ?? 0));
}
