import {
  nextContacts,
  type NextContactChance,
} from '../../../shared/schedule/reasons/next-contacts.ts';
import type { NextContact } from '../../../shared/schemas/edit.ts';
import { DAY_MS, dayOf, dayStart, toIso } from '../../../shared/time.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import { getSatellite } from '../satellites/satellite.service.ts';
import { Face } from '../stations/face.entity.ts';
import { getStation } from '../stations/station.service.ts';
import { standingContacts, type WishedContact } from './contact-store.ts';
import { planOfRecord } from './day-model.ts';
import type { DayPlan } from './plan.entity.ts';
import type { World, Worlds } from './world.ts';

/** Today and tomorrow: an urgent contact is a matter of hours. */
const DAYS = 2;
const MOST = 12;

interface Question {
  person: Person;
  satelliteId: string;
  stationId: string;
  needsUplink: boolean;
}

interface DayInHand {
  plan: DayPlan | null;
  world: World;
  contacts: WishedContact[];
}

/** The next chances of a satellite on all faces, soonest first, against the plans of record. */
export const nextContactsOf = async (
  deps: Deps,
  worlds: Worlds,
  { person, satelliteId, stationId, needsUplink }: Question,
): Promise<NextContact[]> => {
  const em = reader(deps);
  await getSatellite(em, person, satelliteId);
  await getStation(em, stationId);
  const nowMs = deps.clock.now();
  const days: DayInHand[] = [];
  for (let index = 0; index < DAYS; index++) {
    const day = dayOf(dayStart(nowMs) + index * DAY_MS);
    const plan = await planOfRecord(em, stationId, day);
    const faces = await em.find(Face, { station: stationId });
    const limitOfDayDb = plan?.limitOfDayDb ?? Math.max(...faces.map((face) => face.normalLimitDb));
    const world = await worlds.of({ station: { id: stationId }, day, limitOfDayDb });
    const contacts = plan ? await standingContacts(em, plan.id) : [];
    days.push({ plan, world, contacts });
  }
  const found = nextContacts({
    days: days.map(({ world, contacts }) => ({ context: world.context, contacts })),
    satelliteId,
    fromMs: nowMs,
    needsUplink,
    limit: MOST,
  });
  return found.flatMap((chance) => {
    const day = days[chance.dayIndex];
    return day ? [present(chance, day)] : [];
  });
};

const present = (
  chance: NextContactChance,
  { plan, world }: { plan: DayPlan | null; world: World },
): NextContact => ({
  passId: chance.passId,
  faceId: chance.faceId,
  fromUtc: toIso(chance.fromMs),
  toUtc: toIso(chance.toMs),
  maxElevationDeg: chance.maxElevationDeg,
  receiveChannelId: chance.receive?.channelId ?? null,
  transmitChannelId: chance.transmit?.channelId ?? null,
  transmitFromUtc: chance.transmit ? toIso(chance.transmit.fromMs) : null,
  transmitToUtc: chance.transmit ? toIso(chance.transmit.toMs) : null,
  planId: plan?.id ?? null,
  displaces: chance.displaces.map((contact) => ({
    id: contact.id,
    satelliteName: world.context.satellites.get(contact.satelliteId)?.name ?? '',
    missionId: contact.missionId,
  })),
  words: chance.words,
});
