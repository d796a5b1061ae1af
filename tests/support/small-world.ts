import { randomUUID } from 'node:crypto';
import type { Deps, Person } from '../../server/deps.ts';
import { createMission } from '../../server/modules/missions/mission.service.ts';
import { createRequirement } from '../../server/modules/missions/requirement.service.ts';
import { createSatellite } from '../../server/modules/satellites/satellite.service.ts';
import { hashPassword } from '../../server/modules/sessions/password.ts';
import {
  createChannel,
  createFace,
  createStation,
} from '../../server/modules/stations/station.service.ts';
import { User } from '../../server/modules/users/user.entity.ts';
import { STATIONS } from '../../server/seeders/demo-world.ts';
import type { Role } from '../../shared/schemas/session.ts';

export const PASSWORD = 'a password for tests';

/** Who signs in: one person a role, two leads of one mission each, and one person with two roles. */
export const PEOPLE = {
  operator: ['operator'],
  scheduler: ['scheduler'],
  lead: ['lead'],
  lead2: ['lead'],
  admin: ['administrator'],
  both: ['scheduler', 'lead'],
} as const satisfies Record<string, Role[]>;
export type Who = keyof typeof PEOPLE;

export interface SmallWorld {
  people: Record<Who, Person>;
  stationId: string;
  faceId: string;
  channels: Record<string, string>;
  missions: { alder: string; birch: string };
  satellites: Record<string, string>;
}

export const emailOf = (who: Who): string => `${who}@test.example`;

const addPeople = async (deps: Deps): Promise<Record<Who, Person>> => {
  const passwordHash = await hashPassword(PASSWORD);
  const em = deps.orm.em.fork();
  const people = {} as Record<Who, Person>;
  for (const [who, roles] of Object.entries(PEOPLE) as [Who, Role[]][]) {
    const person = {
      id: randomUUID(),
      name: `Person ${who}`,
      email: emailOf(who),
      roles,
      leadsMissionIds: [],
      sessionId: null,
    };
    em.create(User, {
      id: person.id,
      name: person.name,
      email: person.email,
      passwordHash,
      roles,
      createdMs: deps.clock.now(),
    });
    people[who] = person;
  }
  await em.flush();
  return people;
};

const [STATION] = STATIONS;
if (!STATION) throw new Error('the demo has no station');

const downlink = (polarisation: 'rhcp' | 'lhcp') => ({
  frequencyMhz: 2245,
  bandwidthKhz: 2000,
  polarisation,
  eirpDbw: 0,
  rateKbps: 1000,
  requiredEbN0Db: 4,
});
export const UPLINK = {
  frequencyMhz: 2067.5,
  bandwidthKhz: 200,
  polarisation: 'rhcp' as const,
  gOverTDbK: -28,
  rateKbps: 64,
  requiredEbN0Db: 9.6,
};

/** Catalogue numbers of the small world's satellites; their sets are those of tle/demo.tle. */
export const NUMBERS = { 'Alder 1': 91001, 'Alder 2': 91002, 'Birch 1': 91014, 'Birch 2': 91015 };

/** One station with one face, six receive and two transmit channels; two missions of two satellites each. */
export const buildSmallWorld = async (deps: Deps): Promise<SmallWorld> => {
  const people = await addPeople(deps);
  const { faces, ...stationWish } = STATION;
  const station = await createStation(deps, people.admin, stationWish);
  const [{ channels: wishes, ...faceWish }] = faces as [(typeof faces)[number]];
  const face = await createFace(deps, people.admin, { ...faceWish, stationId: station.id });
  const channels: Record<string, string> = {};
  for (const wish of wishes)
    channels[wish.label] = (
      await createChannel(deps, people.admin, { ...wish, faceId: face.id })
    ).id;

  const mission = async (name: string, code: string, leadIds: string[]): Promise<string> =>
    (
      await createMission(deps, people.admin, {
        name,
        code,
        series: code === 'ALD' ? 1 : 2,
        priority: 2,
        leadIds,
      })
    ).mission.id;
  const missions = {
    alder: await mission('Alder', 'ALD', [people.lead.id]),
    birch: await mission('Birch', 'BRC', [people.lead2.id]),
  };
  await createRequirement(deps, people.admin, {
    missionId: missions.alder,
    appliesTo: 'each',
    stationId: null,
    what: 'contacts',
    least: 2,
    most: null,
    minimumDurationSeconds: 120,
    uplink: 'none',
    leastUplinkMinutes: null,
    minimumElevationDeg: null,
    marginFloorDb: null,
    hoursUtc: null,
    weekdays: null,
    scanLossLimitDb: null,
  });
  await createRequirement(deps, people.admin, {
    missionId: missions.birch,
    appliesTo: 'each',
    stationId: null,
    what: 'contacts',
    least: 2,
    most: null,
    minimumDurationSeconds: 120,
    uplink: 'required',
    leastUplinkMinutes: 1,
    minimumElevationDeg: null,
    marginFloorDb: null,
    hoursUtc: null,
    weekdays: null,
    scanLossLimitDb: null,
  });

  const satellites: Record<string, string> = {};
  for (const [name, catalogNumber] of Object.entries(NUMBERS)) {
    const isAlder = name.startsWith('Alder');
    const made = await createSatellite(deps, people.operator, {
      wish: {
        name,
        catalogNumber,
        missionId: isAlder ? missions.alder : missions.birch,
        downlink: downlink(isAlder ? 'lhcp' : 'rhcp'),
        uplink: isAlder ? null : UPLINK,
        transmitsAlways: false,
        requiredCOverIDb: null,
        guardTimeSeconds: null,
        timeUncertaintySeconds: 0,
      },
      adopt: () => Promise.resolve(),
    });
    satellites[name] = made.id;
  }
  return { people, stationId: station.id, faceId: face.id, channels, missions, satellites };
};
