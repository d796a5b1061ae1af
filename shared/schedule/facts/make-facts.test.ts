import { describe, expect, it } from 'vitest';
import { inventedDay } from '../../../tests/support/schedule/invented-day.ts';
import { directionOnFace } from '../../array/face-geometry.ts';
import { scanLossDb } from '../../array/scan-loss.ts';
import { lookAnglesAt, directionAt } from '../../orbit/track.ts';
import { taperWeights } from '../../array/taper.ts';
import type { DayModel, Direction, FaceModel, PassModel } from '../model.ts';
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

/** Level of a Taylor-weighted line, power ratio, by the plain sum over its elements. */
function linePower(weights: readonly number[], pitchWl: number, u: number): number {
  let [re, im, total] = [0, 0, 0];
  for (const [n, weight] of weights.entries()) {
    re += weight * Math.cos(2 * Math.PI * n * pitchWl * u);
    im += weight * Math.sin(2 * Math.PI * n * pitchWl * u);
    total += weight;
  }
  return (re ** 2 + im ** 2) / total ** 2;
}

/** Receive C/I once more, as powers, for the faces of the invented day: exponent 1.2, floor 38 dB, one frequency. */
function ratioDb(
  day: DayModel,
  face: FaceModel,
  [wanted, other]: [PassModel, PassModel],
  ms: number,
) {
  const weights = taperWeights(face.receiveTaper, 24);
  const power = (pass: PassModel): number => {
    const satellite = day.satellites.find(({ id }) => id === pass.satelliteId);
    const eirp = 10 ** ((satellite?.downlink.eirpDbw ?? NaN) / 10);
    return eirp / lookAnglesAt(pass.track, ms).rangeKm ** 2;
  };
  const [on, off] = [wanted, other].map(({ track }) =>
    directionOnFace(face, directionAt(track, ms)),
  );
  if (!on || !off) throw new Error('no direction');
  const pitchWl = 0.068 / (299.792458 / 2245);
  const pattern =
    linePower(weights, pitchWl, off.u - on.u) * linePower(weights, pitchWl, off.v - on.v);
  const carrier = power(wanted) * on.w ** 1.2;
  return 10 * Math.log10(carrier / (power(other) * off.w ** 1.2 * (pattern + 10 ** -3.8)));
}

describe('conflicts', () => {
  it('are the instants at which one of two downlinks has too little C/I, and only those', () => {
    const day = inventedDay({ seed: 7, satellites: 40, faces: 2, hours: [0, 12] });
    for (const [index, { downlink }] of day.satellites.entries()) {
      Object.assign(downlink, { frequencyMhz: 2245, polarisation: 'rhcp' });
      downlink.eirpDbw = 4 + (index % 4);
    }
    const { windows, conflicts } = makeFacts(day);
    expect(conflicts.length).toBeGreaterThan(10);
    const [face] = day.faces;
    if (!face) throw new Error('no face');
    const passes = new Map(day.passes.map((pass) => [pass.id, pass]));
    const received = windows.filter((one) => one.faceId === face.id && one.direction === 'receive');
    const wrong: string[] = [];
    let close = 0;
    for (const [index, a] of received.entries())
      for (const b of received.slice(index + 1)) {
        const [passA, passB] = [passes.get(a.passId), passes.get(b.passId)];
        if (!passA || !passB || passA.satelliteId === passB.satelliteId) continue;
        const known = conflicts.filter(
          ({ passIds, faceId, direction }) =>
            direction === 'receive' &&
            faceId === face.id &&
            passIds.includes(passA.id) &&
            passIds.includes(passB.id),
        );
        const fromMs = Math.ceil(Math.max(a.fromMs, b.fromMs) / 1000) * 1000;
        for (let ms = fromMs; ms < Math.min(a.toMs, b.toMs); ms += 1000) {
          const least = Math.min(
            ratioDb(day, face, [passA, passB], ms),
            ratioDb(day, face, [passB, passA], ms),
          );
          if (least < 20) close++;
          // Doppler moves up to 5 % of the other's power out of the band: 0.25 dB.
          if (Math.abs(least - 20) < 0.25) continue;
          const inside = known.some((one) => one.fromMs <= ms && ms < one.toMs);
          if (inside !== least < 20) wrong.push(`${passA.id} ${passB.id} ${ms} ${least}`);
        }
      }
    expect(wrong).toEqual([]);
    expect(close).toBeGreaterThan(30);
  }, 20_000);

  it('say what the victim has and needs at the worst instant, and who it is', () => {
    const day = inventedDay({ seed: 7, satellites: 24, faces: 2, hours: [0, 12] });
    for (const { downlink } of day.satellites)
      Object.assign(downlink, { frequencyMhz: 2245, polarisation: 'rhcp' });
    const [loud] = day.satellites;
    if (!loud) throw new Error('no satellite');
    loud.requiredCOverIDb = 26;
    const { conflicts } = makeFacts(day);
    for (const conflict of conflicts) {
      const victim = day.passes.find(({ id }) => id === conflict.victimPassId);
      expect(conflict.passIds).toContain(victim?.id);
      expect(conflict.requiredDb).toBe(victim?.satelliteId === loud.id ? 26 : 20);
      expect(conflict.isolationDb ?? NaN).toBeLessThanOrEqual((conflict.requiredDb ?? NaN) + 1e-3);
      expect(conflict.worstAtMs).toBeGreaterThanOrEqual(conflict.fromMs);
      expect(conflict.worstAtMs).toBeLessThanOrEqual(conflict.toMs);
    }
    expect(conflicts.length).toBeGreaterThan(5);
  });

  it('are fewer between opposite circular senses, and none between separate bands', () => {
    const day = inventedDay({ seed: 7, satellites: 40, faces: 2, hours: [0, 10] });
    const received = (): number =>
      makeFacts(day).conflicts.filter(({ direction }) => direction === 'receive').length;
    for (const { downlink } of day.satellites)
      Object.assign(downlink, { frequencyMhz: 2245, polarisation: 'rhcp' });
    const same = received();
    for (const [index, { downlink }] of day.satellites.entries())
      downlink.polarisation = index % 2 ? 'rhcp' : 'lhcp';
    const mixed = received();
    expect(mixed).toBeLessThan(same);
    for (const [index, { downlink }] of day.satellites.entries())
      Object.assign(downlink, { frequencyMhz: 2202 + 2.15 * index, bandwidthKhz: 1900 });
    expect(received()).toBe(0);
  });
});
