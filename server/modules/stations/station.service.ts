import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { IANAZone } from 'luxon';
import type { CreateChannel, PatchChannel } from '../../../shared/schemas/channel.ts';
import type { CreateFace, PatchFace } from '../../../shared/schemas/face.ts';
import type { CreateStation, PatchStation } from '../../../shared/schemas/station.ts';
import { inTransaction, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, notFound, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { audit } from '../audit/audit.service.ts';
import { Channel } from './channel.entity.ts';
import { Face } from './face.entity.ts';
import { Station } from './station.entity.ts';

export const getStation = async (em: EntityManager, id: string): Promise<Station> => {
  const station = await em.findOne(Station, id);
  if (!station) throw notFound('The station');
  return station;
};
export const getFace = async (em: EntityManager, id: string): Promise<Face> => {
  const face = await em.findOne(Face, id);
  if (!face) throw notFound('The face');
  return face;
};
export const getChannel = async (em: EntityManager, id: string): Promise<Channel> => {
  const channel = await em.findOne(Channel, id, { populate: ['face'] });
  if (!channel) throw notFound('The channel');
  return channel;
};

const checkZone = (zone: string | undefined): void => {
  if (zone === undefined || IANAZone.isValidZone(zone)) return;
  throw unprocessable('unknown-time-zone', `${zone} is not an IANA time zone.`, [
    { pointer: '/timeZone', detail: 'A name such as Europe/Oslo or UTC is needed' },
  ]);
};

interface Said {
  action: string;
  id: string;
  summary: string;
  details?: Record<string, unknown>;
}
const sayStation = async (work: Work, person: Person, said: Said): Promise<void> => {
  await audit(work, person, {
    action: said.action,
    entity: said.action.split('.')[0] ?? 'station',
    entityId: said.id,
    summary: said.summary,
    ...(said.details && { details: said.details }),
  });
};

export const createStation = (deps: Deps, person: Person, wish: CreateStation): Promise<Station> =>
  inTransaction(deps, async (work) => {
    checkZone(wish.timeZone);
    if (await work.em.findOne(Station, { name: wish.name }))
      throw conflict('name-taken', `A station named ${wish.name} exists already.`);
    const station = work.em.create(Station, { id: randomUUID(), ...wish });
    await work.em.flush();
    await sayStation(work, person, {
      action: 'station.create',
      id: station.id,
      summary: `Station ${station.name}`,
    });
    work.tell({ topic: 'station', id: station.id, version: station.version, geometry: true });
    return station;
  });

const GEOMETRY = [
  'latitudeDeg',
  'longitudeDeg',
  'heightM',
  'horizonMask',
  'ut1MinusUtcSeconds',
] as const;

export const patchStation = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchStation; ifMatch: string },
): Promise<Station> =>
  inTransaction(deps, async (work) => {
    const station = await getStation(work.em, id);
    checkTag(ifMatch, id, station.version, 'The station');
    checkZone(wish.timeZone);
    const before = JSON.stringify(GEOMETRY.map((field) => station[field]));
    // Field by field from a strict schema: nothing but what the schema names can get here.
    for (const [field, value] of Object.entries(wish))
      if (value !== undefined) Object.assign(station, { [field]: value });
    const geometry = JSON.stringify(GEOMETRY.map((field) => station[field])) !== before;
    await work.em.flush();
    await sayStation(work, person, {
      action: 'station.change',
      id,
      summary: `Station ${station.name} changed`,
      details: { ...wish },
    });
    work.tell({ topic: 'station', id, version: station.version, geometry });
    return station;
  });

/** Something to the right in the line of modules refers to it (wired in app.ts). */
export type InUse = (work: Work, id: string) => Promise<boolean>;

export const deleteStation = (
  deps: Deps,
  person: Person,
  { id, ifMatch }: { id: string; ifMatch: string },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const station = await getStation(work.em, id);
    checkTag(ifMatch, id, station.version, 'The station');
    if ((await work.em.count(Face, { station: id })) > 0)
      throw conflict('in-use', `${station.name} has faces. Remove them first.`);
    await work.em.nativeDelete(Station, { id });
    await sayStation(work, person, {
      action: 'station.delete',
      id,
      summary: `Station ${station.name} deleted`,
    });
    work.tell({ topic: 'station', id, version: station.version, geometry: false });
  });

const checkHardEnd = (face: Pick<Face, 'normalLimitDb' | 'hardEndDb'>): void => {
  if (face.normalLimitDb <= face.hardEndDb) return;
  throw unprocessable('invalid-body', 'The normal limit lies within the hard end.', [
    { pointer: '/normalLimitDb', detail: 'At most the hard end' },
  ]);
};

export const createFace = (deps: Deps, person: Person, wish: CreateFace): Promise<Face> =>
  inTransaction(deps, async (work) => {
    await getStation(work.em, wish.stationId);
    const { stationId, ...fields } = wish;
    const face = work.em.create(Face, { id: randomUUID(), station: stationId, ...fields });
    await work.em.flush();
    await sayStation(work, person, {
      action: 'face.create',
      id: face.id,
      summary: `Face ${face.label}`,
    });
    work.tell({ topic: 'station', id: stationId, version: 1, geometry: false });
    return face;
  });

export const patchFace = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchFace; ifMatch: string },
): Promise<Face> =>
  inTransaction(deps, async (work) => {
    const face = await getFace(work.em, id);
    checkTag(ifMatch, id, face.version, 'The face');
    for (const [field, value] of Object.entries(wish))
      if (value !== undefined) Object.assign(face, { [field]: value });
    checkHardEnd(face);
    await work.em.flush();
    await sayStation(work, person, {
      action: 'face.change',
      id,
      summary: `Face ${face.label} changed`,
      details: { ...wish },
    });
    work.tell({ topic: 'station', id: face.station.id, version: face.version, geometry: false });
    return face;
  });

export const deleteFace = (
  deps: Deps,
  person: Person,
  { id, ifMatch }: { id: string; ifMatch: string },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const face = await getFace(work.em, id);
    checkTag(ifMatch, id, face.version, 'The face');
    if ((await work.em.count(Channel, { face: id })) > 0)
      throw conflict('in-use', `Face ${face.label} has channels. Remove them first.`);
    const stationId = face.station.id;
    await work.em.nativeDelete(Face, { id });
    await sayStation(work, person, {
      action: 'face.delete',
      id,
      summary: `Face ${face.label} deleted`,
    });
    work.tell({ topic: 'station', id: stationId, version: face.version, geometry: false });
  });

const refuseLabel = async (em: EntityManager, faceId: string, label: string, id: string) => {
  if (await em.findOne(Channel, { face: faceId, label, id: { $ne: id } }))
    throw conflict('label-taken', `The face has a channel ${label} already.`);
};

export const createChannel = (deps: Deps, person: Person, wish: CreateChannel): Promise<Channel> =>
  inTransaction(deps, async (work) => {
    const id = randomUUID();
    const face = await getFace(work.em, wish.faceId);
    await refuseLabel(work.em, face.id, wish.label, id);
    const { faceId, ...fields } = wish;
    const channel = work.em.create(Channel, { id, face: faceId, ...fields });
    await work.em.flush();
    await sayStation(work, person, {
      action: 'channel.create',
      id,
      summary: `Channel ${channel.label}`,
    });
    work.tell({ topic: 'station', id: face.station.id, version: 1, geometry: false });
    return channel;
  });

export const patchChannel = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchChannel; ifMatch: string },
): Promise<Channel> =>
  inTransaction(deps, async (work) => {
    const channel = await getChannel(work.em, id);
    checkTag(ifMatch, id, channel.version, 'The channel');
    if (wish.label !== undefined) await refuseLabel(work.em, channel.face.id, wish.label, id);
    for (const [field, value] of Object.entries(wish))
      if (value !== undefined) Object.assign(channel, { [field]: value });
    await work.em.flush();
    await sayStation(work, person, {
      action: 'channel.change',
      id,
      summary: `Channel ${channel.label} changed`,
      details: { ...wish },
    });
    const face = await getFace(work.em, channel.face.id);
    work.tell({ topic: 'station', id: face.station.id, version: 1, geometry: false });
    return channel;
  });

export const deleteChannel = (
  deps: Deps,
  person: Person,
  { id, ifMatch, inUse }: { id: string; ifMatch: string; inUse: InUse },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const channel = await getChannel(work.em, id);
    checkTag(ifMatch, id, channel.version, 'The channel');
    if (await inUse(work, id))
      throw conflict(
        'in-use',
        `Contacts refer to channel ${channel.label}. Take it out of service instead.`,
      );
    const face = await getFace(work.em, channel.face.id);
    await work.em.nativeDelete(Channel, { id });
    await sayStation(work, person, {
      action: 'channel.delete',
      id,
      summary: `Channel ${channel.label} deleted`,
    });
    work.tell({ topic: 'station', id: face.station.id, version: 1, geometry: false });
  });
