import { describe, expect, it } from 'vitest';
import { inventedDay } from '../../../tests/support/schedule/invented-day.ts';
import { directionOnFace } from '../../array/face-geometry.ts';
import { scanLossDb } from '../../array/scan-loss.ts';
import { lookAnglesAt, directionAt } from '../../orbit/track.ts';
import { halfPowerBeamwidthU } from '../../array/beamwidth.ts';
import type { DayModel, Direction, FaceModel, PassModel } from '../model.ts';
import { areCoFrequency } from '../radio-fit.ts';
import { makeFacts } from './make-facts.ts';

/** A day with everything that shapes a window: mask, floors, a sector past north, a loss table, tilted faces. */
function craggyDay(seed: number): DayModel {
  const day = inventedDay({ seed, satellites: 10, faces: 3, hours: [0, 8] });
  day.station.horizonMask = [
    { azimuthDeg: 350, elevationDeg: 6 },
    { azimuthDeg: 20, elevationDeg: 14 },
    { azimuthDeg: 120, elevationDeg: 3 },
    { azimuthDeg: 240, elevationDeg: 9.5 },
  ];
  day.station.keepOutSectors = [
    {
      label: 'road',
      azimuthFromDeg: 340,
      azimuthToDeg: 30,
      elevationFromDeg: 0,
      elevationToDeg: 25,
    },
    {
      label: 'mast',
      azimuthFromDeg: 200,
      azimuthToDeg: 203,
      elevationFromDeg: 0,
      elevationToDeg: 90,
    },
  ];
  const [first] = day.faces;
  if (first)
    first.scanLossTable = [
      [0, 0],
      [20, 0.3],
      [40, 1.5],
      [60, 4.1],
    ];
  return day;
}

function mask(day: DayModel, azimuthDeg: number): number {
  const knots = day.station.horizonMask;
  for (const [index, knot] of knots.entries()) {
    const next = knots[(index + 1) % knots.length] ?? knot;
    const span = (next.azimuthDeg - knot.azimuthDeg + 360) % 360;
    const along = (azimuthDeg - knot.azimuthDeg + 360) % 360;
    if (along < span)
      return knot.elevationDeg + ((next.elevationDeg - knot.elevationDeg) * along) / span;
  }
  return 0;
}

/** The conditions once more, in other words: degrees and decibels at one instant. */
function usable(
  day: DayModel,
  pass: PassModel,
  face: FaceModel,
  direction: Direction,
  ms: number,
): boolean {
  const { azimuthDeg, elevationDeg } = lookAnglesAt(pass.track, ms);
  const { station } = day;
  const loss = scanLossDb(face, directionOnFace(face, directionAt(pass.track, ms)).scanAngleRad);
  const received =
    elevationDeg >= station.receiveElevationFloorDeg && elevationDeg >= mask(day, azimuthDeg);
  if (!received || loss === null || loss > day.limitOfDayDb || loss > face.hardEndDb) return false;
  if (direction === 'receive') return true;
  const blocked = station.keepOutSectors.some((sector) => {
    const offset = (azimuthDeg - sector.azimuthFromDeg + 360) % 360;
    const width = (sector.azimuthToDeg - sector.azimuthFromDeg + 360) % 360;
    return (
      offset <= width &&
      elevationDeg >= sector.elevationFromDeg &&
      elevationDeg <= sector.elevationToDeg
    );
  });
  return elevationDeg >= station.transmitElevationFloorDeg && !blocked;
}

describe('usable windows', () => {
  it.each([1, 2, 3])(
    'hold at every second what the sky allows, no more and no less (day %s)',
    (seed) => {
      const day = craggyDay(seed);
      const { windows } = makeFacts(day);
      expect(windows.length).toBeGreaterThan(20);
      const wrong: string[] = [];
      for (const pass of day.passes)
        for (const face of day.faces)
          for (const direction of ['receive', 'transmit'] as const) {
            const satellite = day.satellites.find(({ id }) => id === pass.satelliteId);
            if (direction === 'transmit' && !satellite?.uplink) continue;
            const own = windows.filter(
              (one) =>
                one.passId === pass.id && one.faceId === face.id && one.direction === direction,
            );
            for (let ms = Math.ceil(pass.fromMs / 1000) * 1000; ms < pass.toMs; ms += 1000) {
              const inside = own.some(({ fromMs, toMs }) => fromMs <= ms && ms < toMs);
              if (inside !== usable(day, pass, face, direction, ms))
                wrong.push(`${pass.id} ${face.id} ${direction} ${ms} ${inside}`);
            }
          }
      expect(wrong).toEqual([]);
    },
  );

  it('end within a millisecond of the crossing', () => {
    const day = craggyDay(4);
    let checked = 0;
    for (const window of makeFacts(day).windows) {
      const pass = day.passes.find(({ id }) => id === window.passId);
      const face = day.faces.find(({ id }) => id === window.faceId);
      if (!pass || !face) continue;
      const at = (ms: number): boolean => usable(day, pass, face, window.direction, ms);
      if (window.fromMs > pass.fromMs + 2) expect(at(window.fromMs - 1)).toBe(false);
      if (window.toMs < pass.toMs - 2) expect(at(window.toMs + 1)).toBe(false);
      if (window.toMs - window.fromMs > 4) {
        expect(at(window.fromMs + 1)).toBe(true);
        expect(at(window.toMs - 1)).toBe(true);
        checked++;
      }
    }
    expect(checked).toBeGreaterThan(20);
  });

  it('carry the least and largest scan loss met in them', () => {
    const day = inventedDay({ satellites: 6, hours: [0, 6] });
    for (const window of makeFacts(day).windows) {
      const pass = day.passes.find(({ id }) => id === window.passId);
      const face = day.faces.find(({ id }) => id === window.faceId);
      if (!pass || !face) throw new Error('facts of an unknown pass');
      const losses: number[] = [];
      for (let ms = window.fromMs; ms <= window.toMs; ms += 500) {
        const { scanAngleRad } = directionOnFace(face, directionAt(pass.track, ms));
        losses.push(scanLossDb(face, scanAngleRad) ?? NaN);
      }
      expect(window.minScanLossDb).toBeCloseTo(Math.min(...losses), 2);
      expect(window.maxScanLossDb).toBeCloseTo(Math.max(...losses), 1);
    }
  });

  it('follow a requirement that is looser than the limit of the day, never beyond the hard end', () => {
    const day = inventedDay({ satellites: 4, missions: 1, hours: [0, 6] });
    const lengths = (limitDb: number | null): number => {
      const lines = day.requirements.map((line) => ({ ...line, scanLossLimitDb: limitDb }));
      const { windows } = makeFacts({ ...day, requirements: lines });
      return windows.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);
    };
    expect(lengths(2)).toBeLessThan(lengths(null));
    expect(lengths(4.5)).toBeGreaterThan(lengths(null));
    expect(lengths(9)).toBe(lengths(5));
  });
});

describe('conflicts', () => {
  it('are the instants at which co-frequency beams are too close, and only those', () => {
    const day = inventedDay({ seed: 7, satellites: 40, faces: 2, hours: [0, 18] });
    for (const { downlink } of day.satellites) downlink.frequencyMhz = 2245;
    const { windows, conflicts } = makeFacts(day);
    expect(conflicts.length).toBeGreaterThan(10);
    const face = day.faces[0];
    if (!face) throw new Error('no face');
    const axis = { elements: 24, pitchMm: 68, taper: face.receiveTaper };
    const width = halfPowerBeamwidthU(axis, 2245);
    const received = windows.filter((one) => one.faceId === face.id && one.direction === 'receive');
    const wrong: string[] = [];
    let close = 0;
    for (const a of received)
      for (const b of received) {
        const [passA, passB] = [a, b].map(({ passId }) =>
          day.passes.find(({ id }) => id === passId),
        );
        if (!passA || !passB || passA.satelliteId >= passB.satelliteId) continue;
        const [one, other] = [passA, passB].map(({ satelliteId }) =>
          day.satellites.find(({ id }) => id === satelliteId),
        );
        if (!one || !other || !areCoFrequency(one.downlink, other.downlink)) continue;
        const fromMs = Math.ceil(Math.max(a.fromMs, b.fromMs) / 1000) * 1000;
        for (let ms = fromMs; ms < Math.min(a.toMs, b.toMs); ms += 1000) {
          const [onA, onB] = [passA, passB].map(({ track }) =>
            directionOnFace(face, directionAt(track, ms)),
          );
          if (!onA || !onB) throw new Error('no direction');
          const apart = Math.hypot(onA.u - onB.u, onA.v - onB.v) / width;
          const known = conflicts.some(
            ({ passIds, faceId, fromMs: from, toMs: to }) =>
              faceId === face.id &&
              passIds.includes(passA.id) &&
              passIds.includes(passB.id) &&
              from <= ms &&
              ms < to,
          );
          if (apart < 1.25) close++;
          if (known !== apart < 1.25) wrong.push(`${passA.id} ${passB.id} ${ms} ${apart}`);
        }
      }
    expect(wrong).toEqual([]);
    expect(close).toBeGreaterThan(30);
  });

  it('are none between opposite circular senses or separate bands', () => {
    const day = inventedDay({ seed: 7, satellites: 40, faces: 2, hours: [0, 10] });
    for (const [index, satellite] of day.satellites.entries()) {
      satellite.downlink.frequencyMhz = 2210 + 3 * (index >> 1);
      satellite.downlink.polarisation = index % 2 ? 'rhcp' : 'lhcp';
    }
    expect(makeFacts(day).conflicts.filter(({ direction }) => direction === 'receive')).toEqual([]);
  });
});
