/**
 * C/I of 16 beams at one instant, and all pairs of a 300-pass day. The bounds are those of issue 5; times on a loaded
 * machine vary, so they are printed and only the count of what was found decides.
 */
import { directionOf } from '../../shared/array/direction.ts';
import { directionOnFace } from '../../shared/array/face-geometry.ts';
import { faceBeamPattern } from '../../shared/link/face-radio.ts';
import { receiveCarrierToInterferenceDb } from '../../shared/link/interference.ts';
import { findConflicts } from '../../shared/schedule/facts/conflicts.ts';
import { findWindows } from '../../shared/schedule/facts/windows.ts';
import { inventedDay } from '../support/schedule/invented-day.ts';
import { inventedFace } from '../support/schedule/invented-station.ts';

const REPEATS = 5;

function leastMs(work: () => unknown): number {
  let least = Infinity;
  for (let repeat = 0; repeat < REPEATS; repeat++) {
    const startMs = performance.now();
    work();
    least = Math.min(least, performance.now() - startMs);
  }
  return least;
}

function sixteenBeams(): number[] {
  const face = inventedFace('F1');
  const beam = {
    pattern: faceBeamPattern(face, 'receive', 2245),
    scanLossExponent: face.scanLossExponent,
    scanLossTable: null,
    floorDb: face.sidelobeFloorDb,
  };
  const beams = Array.from({ length: 16 }, (_, index) =>
    directionOnFace(face, directionOf(22.5 * index, 40 + 2.5 * index)),
  );
  return beams.map((wanted) =>
    receiveCarrierToInterferenceDb(
      beam,
      wanted,
      beams.filter((one) => one !== wanted).map((at) => ({ at, relativeDb: 0 })),
    ),
  );
}

const instantMs = leastMs(() => Array.from({ length: 20 }, sixteenBeams)) / 20;
console.log(`C/I of 16 beams at one instant  ${instantMs.toFixed(3)} ms (asked: 1)`);

let failed = false;
for (const crowded of [false, true]) {
  const day = inventedDay({ satellites: 48 });
  if (crowded)
    for (const { downlink, uplink } of day.satellites) {
      Object.assign(downlink, { frequencyMhz: 2245, polarisation: 'rhcp' });
      if (uplink) uplink.frequencyMhz = 2035;
    }
  const { windows } = findWindows(day);
  const conflicts = findConflicts(day, windows);
  const pairsMs = leastMs(() => findConflicts(day, windows));
  const windowsMs = leastMs(() => findWindows(day));
  const name = crowded ? 'all on one frequency' : 'six frequencies';
  console.log(
    `${day.passes.length} passes, ${name}: pairs ${pairsMs.toFixed(0)} ms (asked: 1000), ` +
      `windows with margins ${windowsMs.toFixed(0)} ms; ${windows.length} windows, ${conflicts.length} conflicts`,
  );
  failed ||= windows.length < 100 || (crowded && conflicts.length < 10);
}
process.exit(failed ? 1 : 0);
