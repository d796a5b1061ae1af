import type { EntityManager } from '@mikro-orm/sqlite';
import type {
  ChannelModel,
  ClosureModel,
  ContactModel,
  DayModel,
  FaceModel,
  MissionModel,
  PassModel,
  RequestModel,
  RequirementModel,
  SatelliteModel,
  StationModel,
} from '../../../shared/schedule/model.ts';
import { dayInterval, DAY_MS } from '../../../shared/time.ts';
import { Mission } from '../missions/mission.entity.ts';
import { RequestRow, RequirementRow } from '../missions/requirement.entity.ts';
import { Pass } from '../passes/pass.entity.ts';
import { inForce, type PassInForce } from '../passes/pass.service.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { Channel } from '../stations/channel.entity.ts';
import { Closure } from '../stations/closure.entity.ts';
import { Face } from '../stations/face.entity.ts';
import { presentChannel, presentFace } from '../stations/station.presenter.ts';
import type { Station } from '../stations/station.entity.ts';
import { PlannedContact } from './contact.entity.ts';
import { toContactModel } from './contact-model.ts';
import { DayPlan } from './plan.entity.ts';

/** Where a pass's geometry comes from, for what is shown beside it. */
export interface Source {
  elementSetId: string;
  epochMs: number;
  tcaMs: number;
}
export interface LoadedDay {
  day: DayModel;
  /** By prediction: those in force and those that contacts were planned on. */
  sources: Map<string, Source>;
}

const stationModel = (station: Station): StationModel => ({
  id: station.id,
  latitudeDeg: station.latitudeDeg,
  longitudeDeg: station.longitudeDeg,
  heightM: station.heightM,
  ut1MinusUtcSeconds: station.ut1MinusUtcSeconds,
  horizonMask: station.horizonMask,
  receiveElevationFloorDeg: station.receiveElevationFloorDeg,
  transmitElevationFloorDeg: station.transmitElevationFloorDeg,
  keepOutSectors: station.keepOutSectors,
  guardTimeSeconds: station.guardTimeSeconds,
  freezeTimeSeconds: station.freezeTimeSeconds,
});

const faceModel = (face: Face): FaceModel => {
  const { version: _version, ...model } = presentFace(face);
  return model;
};
const channelModel = (channel: Channel): ChannelModel => {
  const { version: _version, ...model } = presentChannel(channel);
  return model;
};

const closureModel = (closure: Closure): ClosureModel => ({
  id: closure.id,
  scope: closure.scope,
  scopeId: closure.scopeId,
  direction: closure.direction,
  fromMs: closure.fromMs,
  toMs: closure.toMs ?? null,
  reducedByDb: closure.reducedByDb ?? null,
  reason: closure.reason,
});

const missionModel = (mission: Mission): MissionModel => ({
  id: mission.id,
  name: mission.name,
  priority: mission.priority,
});

const satelliteModel = (satellite: Satellite): SatelliteModel => ({
  id: satellite.id,
  missionId: satellite.mission.id,
  name: satellite.name,
  downlink: satellite.downlink,
  uplink: satellite.uplink ?? null,
  transmitsAlways: satellite.transmitsAlways,
  requiredCOverIDb: satellite.requiredCOverIDb ?? null,
  guardTimeSeconds: satellite.guardTimeSeconds ?? null,
  timeUncertaintySeconds: satellite.timeUncertaintySeconds,
});

export const requirementModel = (row: RequirementRow): RequirementModel => ({
  id: row.id,
  missionId: row.mission.id,
  appliesTo: row.appliesTo,
  stationId: row.stationId ?? null,
  what: row.what,
  least: row.least ?? null,
  most: row.most ?? null,
  minimumDurationSeconds: row.minimumDurationSeconds,
  uplink: row.uplink,
  leastUplinkMinutes: row.leastUplinkMinutes ?? null,
  minimumElevationDeg: row.minimumElevationDeg ?? null,
  marginFloorDb: row.marginFloorDb ?? null,
  hoursUtc: row.hoursUtc ?? null,
  weekdays: row.weekdays ?? null,
  scanLossLimitDb: row.scanLossLimitDb ?? null,
});

export const requestModel = (row: RequestRow): RequestModel => ({
  id: row.id,
  missionId: row.mission.id,
  satelliteId: row.satelliteId,
  kind: row.kind,
  passId: row.passId ?? null,
  minutes: row.minutes ?? null,
  uplink: row.uplink,
  fromMs: row.fromMs,
  toMs: row.toMs,
  priority: row.priority,
});

const passModel = ({ pass, prediction, satellite }: PassInForce): PassModel => ({
  id: pass.id,
  predictionId: prediction.id,
  satelliteId: satellite.id,
  missionId: satellite.mission.id,
  fromMs: prediction.aosMs,
  toMs: prediction.losMs,
  tcaMs: prediction.tcaMs,
  maxElevationDeg: prediction.maxElevationDeg,
  track: prediction.track,
  elementEpochMs: prediction.elementSet.epochMs,
});

const STATE_RANK = { released: 0, approved: 1, 'in-review': 2, draft: 3, superseded: 4 } as const;

/** The plan of record of a day: released, else approved, in review, draft. */
export const planOfRecord = async (
  em: EntityManager,
  stationId: string,
  day: string,
): Promise<DayPlan | null> => {
  const plans = await em.find(DayPlan, {
    station: stationId,
    day,
    state: { $ne: 'superseded' },
  });
  return plans.sort((a, b) => STATE_RANK[a.state] - STATE_RANK[b.state])[0] ?? null;
};

const shiftDay = (day: string, days: number): string =>
  new Date(dayInterval(day).fromMs + days * DAY_MS).toISOString().slice(0, 10);

export const neighbourPlans = async (
  em: EntityManager,
  stationId: string,
  day: string,
): Promise<DayPlan[]> => {
  const found = [
    await planOfRecord(em, stationId, shiftDay(day, -1)),
    await planOfRecord(em, stationId, shiftDay(day, 1)),
  ];
  return found.flatMap((plan) => plan ?? []);
};

export const contactsOf = (em: EntityManager, planIds: string[]): Promise<PlannedContact[]> =>
  em.find(
    PlannedContact,
    { plan: { $in: planIds } },
    { populate: ['contact', 'contact.satellite', 'prediction'], orderBy: { receiveFromMs: 'asc' } },
  );

interface DayQuestion {
  station: Station;
  day: string;
  limitOfDayDb: number;
  neighbours: ContactModel[];
}

/** Reads everything that the planning of a day depends on. */
export const loadDay = async (
  em: EntityManager,
  { station, day, limitOfDayDb, neighbours }: DayQuestion,
): Promise<LoadedDay> => {
  const interval = dayInterval(day);
  const faces = await em.find(Face, { station: station.id }, { orderBy: { label: 'asc' } });
  const channels = await em.find(
    Channel,
    { face: { $in: faces.map((face) => face.id) } },
    { orderBy: { label: 'asc' } },
  );
  const closures = await em.find(Closure, { station: station.id });
  const missions = await em.find(Mission, { retired: false }, { orderBy: { name: 'asc' } });
  const passes = await em.find(
    Pass,
    {
      station: station.id,
      vanished: false,
      $or: [
        { aosMs: { $lt: interval.toMs }, losMs: { $gt: interval.fromMs } },
        { id: { $in: neighbours.map((contact) => contact.passId) } },
      ],
    },
    { orderBy: { aosMs: 'asc' } },
  );
  const current = await inForce(em, passes, { withTracks: true });
  const satellites = await em.find(Satellite, { retired: false }, { orderBy: { name: 'asc' } });
  const requirements = await em.find(RequirementRow, {
    mission: { $in: missions.map((mission) => mission.id) },
  });
  const requests = await em.find(RequestRow, {
    state: 'open',
    fromMs: { $lt: interval.toMs },
    toMs: { $gt: interval.fromMs },
  });
  const sources = new Map(
    current.map(({ prediction }) => [
      prediction.id,
      {
        elementSetId: prediction.elementSet.id,
        epochMs: prediction.elementSet.epochMs,
        tcaMs: prediction.tcaMs,
      },
    ]),
  );
  return {
    day: {
      station: stationModel(station),
      faces: faces.map(faceModel),
      channels: channels.map(channelModel),
      closures: closures.map(closureModel),
      missions: missions.map(missionModel),
      satellites: satellites.map(satelliteModel),
      requirements: requirements.map(requirementModel),
      requests: requests.map(requestModel),
      passes: current.map(passModel),
      day: interval,
      limitOfDayDb,
      neighbours,
    },
    sources,
  };
};

export const neighbourContacts = async (
  em: EntityManager,
  plans: DayPlan[],
): Promise<ContactModel[]> =>
  (
    await contactsOf(
      em,
      plans.map((plan) => plan.id),
    )
  ).map(toContactModel);
