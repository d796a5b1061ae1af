import type {
  ChannelModel,
  DayModel,
  FaceModel,
  MissionModel,
  PassModel,
  RequirementModel,
  SatelliteModel,
} from '../../../shared/schedule/model.ts';
import { DAY_MS } from '../../../shared/time.ts';
import { circularPasses, type CircularOrbit } from './circular-orbit.ts';
import { inventedChannel, inventedFace, inventedStation } from './invented-station.ts';
import { pick, seededRandom } from './random.ts';

/** 2026-12-02T00:00:00Z. */
export const DAY_START_MS = Date.UTC(2026, 11, 2);

export interface InventedDayOptions {
  seed: number;
  satellites: number;
  missions: number;
  receiveChannels: number;
  transmitChannels: number;
  /** 1: one face at the zenith; more: tilted 35 deg, evenly around; channels are dealt out in turn. */
  faces: number;
  /** Share of satellites on hours-long passes. */
  highShare: number;
  /** Hours of the day that passes are taken from; the horizon stays the whole day. */
  hours: [number, number];
}

export const ordinaryDay: InventedDayOptions = {
  seed: 1,
  satellites: 24,
  missions: 5,
  receiveChannels: 6,
  transmitChannels: 2,
  faces: 1,
  highShare: 0,
  hours: [0, 24],
};

type Random = () => number;

function orbit(random: Random, high: boolean): CircularOrbit {
  const sunSynchronous = random() < 0.55;
  return {
    altitudeKm: high ? 20180 : 480 + 370 * random(),
    inclinationDeg: sunSynchronous ? 97.5 + random() : 45 + 30 * random(),
    nodeDeg: 360 * random(),
    phaseDeg: 360 * random(),
  };
}

/** EIRP, dBW, that closes the link to the horizon from low orbit, linear on circular too, and from 20,000 km. */
const LOW_EIRP_DBW = 4;
const HIGH_EIRP_DBW = 25;

function satellite(
  random: Random,
  index: number,
  { missionId, high }: { missionId: string; high: boolean },
): SatelliteModel {
  const polarisation = pick(random, ['rhcp', 'lhcp', 'linear']);
  const slot = Math.floor(random() * 6);
  const radio = { bandwidthKhz: 2000, polarisation, rateKbps: 1000, requiredEbN0Db: 3.5 };
  return {
    id: `s${index}`,
    missionId,
    name: `Object ${index}`,
    downlink: {
      ...radio,
      frequencyMhz: 2205 + 5 * slot,
      eirpDbw: high ? HIGH_EIRP_DBW : LOW_EIRP_DBW,
    },
    uplink:
      random() < 0.8
        ? { ...radio, bandwidthKhz: 200, frequencyMhz: 2030 + slot, gOverTDbK: -28 }
        : null,
    transmitsAlways: false,
    requiredCOverIDb: null,
    guardTimeSeconds: null,
    timeUncertaintySeconds: random() < 0.1 ? 3 : 0,
  };
}

const noWishes = {
  most: null,
  leastUplinkMinutes: null,
  minimumElevationDeg: null,
  marginFloorDb: null,
  hoursUtc: null,
  weekdays: null,
  scanLossLimitDb: null,
  stationId: null,
} satisfies Partial<RequirementModel>;

function requirements(random: Random, mission: MissionModel): RequirementModel[] {
  const base = { ...noWishes, missionId: mission.id, minimumDurationSeconds: 180 };
  const uplink = pick(random, ['required', 'wanted', 'none']);
  const lines: RequirementModel[] = [
    {
      ...base,
      id: `${mission.id}-contacts`,
      appliesTo: 'each',
      what: 'contacts',
      least: 1 + Math.floor(2 * random()),
      most: random() < 0.15 ? 4 : null,
      uplink,
      leastUplinkMinutes: uplink === 'required' ? 2 : null,
    },
  ];
  if (random() < 0.5)
    lines.push({
      ...base,
      id: `${mission.id}-minutes`,
      appliesTo: 'together',
      what: 'minutes',
      least: 20 + 30 * random(),
      uplink: 'none',
    });
  if (random() < 0.3)
    lines.push({
      ...base,
      id: `${mission.id}-gap`,
      appliesTo: 'together',
      what: 'gap',
      least: null,
      most: 600,
      uplink: 'none',
    });
  return lines;
}

function stationParts(options: InventedDayOptions): {
  faces: FaceModel[];
  channels: ChannelModel[];
} {
  const faces = Array.from({ length: options.faces }, (_, index) =>
    inventedFace(`F${index + 1}`, {
      boresightAzimuthDeg: (360 / options.faces) * index,
      boresightElevationDeg: options.faces === 1 ? 90 : 55,
    }),
  );
  const deal = (count: number, direction: 'receive' | 'transmit', letter: string): ChannelModel[] =>
    Array.from({ length: count }, (_, index) =>
      inventedChannel(`${letter}${index + 1}`, `F${(index % options.faces) + 1}`, {
        direction,
        bandwidthKhz: direction === 'receive' ? 5000 : 500,
      }),
    );
  const channels = [
    ...deal(options.receiveChannels, 'receive', 'R'),
    ...deal(options.transmitChannels, 'transmit', 'T'),
  ];
  return { faces, channels };
}

/** A whole invented day with real geometry; the same options give the same day. */
export function inventedDay(change: Partial<InventedDayOptions> = {}): DayModel {
  const options = { ...ordinaryDay, ...change };
  const random = seededRandom(options.seed);
  const station = inventedStation();
  const day = { fromMs: DAY_START_MS, toMs: DAY_START_MS + DAY_MS };
  const missions = Array.from({ length: options.missions }, (_, index) => ({
    id: `m${index}`,
    name: `Mission ${index}`,
    priority: 1 + Math.floor(5 * random()),
  }));
  const satellites: SatelliteModel[] = [];
  const passes: PassModel[] = [];
  const span = {
    fromMs: day.fromMs + options.hours[0] * 3_600_000,
    toMs: day.fromMs + options.hours[1] * 3_600_000,
  };
  for (let index = 0; index < options.satellites; index++) {
    const missionId = `m${index % options.missions}`;
    const high = random() < options.highShare;
    const path = orbit(random, high);
    satellites.push(satellite(random, index, { missionId, high }));
    for (const [number, pass] of circularPasses(path, station, 5, span).entries())
      passes.push({
        ...pass,
        id: `s${index}p${number}`,
        predictionId: `s${index}p${number}-1`,
        satelliteId: `s${index}`,
        missionId,
      });
  }
  return {
    station,
    ...stationParts(options),
    closures: [],
    missions,
    satellites,
    requirements: missions.flatMap((mission) => requirements(random, mission)),
    requests: [],
    passes: passes.sort((a, b) => a.fromMs - b.fromMs),
    day,
    limitOfDayDb: 3.6,
    neighbours: [],
  };
}
