import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { can } from '../../../shared/policy.ts';
import type { CreateClosure, PatchClosure } from '../../../shared/schemas/channel.ts';
import { fromIso } from '../../../shared/time.ts';
import { inTransaction, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, forbidden, notFound, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { audit } from '../audit/audit.service.ts';
import { Closure } from './closure.entity.ts';
import { getChannel, getFace, getStation } from './station.service.ts';

export const getClosure = async (em: EntityManager, id: string): Promise<Closure> => {
  const closure = await em.findOne(Closure, id);
  if (!closure) throw notFound('The closure');
  return closure;
};

/** The station of what is closed; 404 when it does not exist. */
const stationOf = async (
  em: EntityManager,
  { scope, scopeId }: Pick<CreateClosure, 'scope' | 'scopeId'>,
): Promise<string> => {
  if (scope === 'station') return (await getStation(em, scopeId)).id;
  if (scope === 'face') return (await getFace(em, scopeId)).station.id;
  const channel = await getChannel(em, scopeId);
  return (await getFace(em, channel.face.id)).station.id;
};

const tellClosure = (work: Work, closure: Closure): void =>
  work.tell({
    topic: 'closure',
    id: closure.id,
    version: closure.version,
    stationId: closure.station.id,
  });

/** Always accepted: a closure is a fact. Contacts that it hits are shown, never edited. */
export const createClosure = (deps: Deps, person: Person, wish: CreateClosure): Promise<Closure> =>
  inTransaction(deps, async (work) => {
    const station = await stationOf(work.em, wish);
    const closure = work.em.create(Closure, {
      id: randomUUID(),
      station,
      scope: wish.scope,
      scopeId: wish.scopeId,
      direction: wish.direction,
      fromMs: fromIso(wish.fromUtc),
      toMs: wish.toUtc === null ? null : fromIso(wish.toUtc),
      reducedByDb: wish.reducedByDb,
      reason: wish.reason,
      createdByName: person.name,
    });
    await work.em.flush();
    await audit(work, person, {
      action: 'closure.create',
      entity: 'closure',
      entityId: closure.id,
      summary: `Closure: ${closure.reason}`,
      details: { ...wish },
    });
    tellClosure(work, closure);
    return closure;
  });

export const patchClosure = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchClosure; ifMatch: string },
): Promise<Closure> =>
  inTransaction(deps, async (work) => {
    const closure = await getClosure(work.em, id);
    checkTag(ifMatch, id, closure.version, 'The closure');
    if (closure.inhibit)
      throw conflict('inhibit', 'A transmit inhibit is ended by name, not edited.');
    if (wish.fromUtc !== undefined) closure.fromMs = fromIso(wish.fromUtc);
    if (wish.toUtc !== undefined) closure.toMs = wish.toUtc === null ? null : fromIso(wish.toUtc);
    if (wish.reason !== undefined) closure.reason = wish.reason;
    if (closure.toMs !== null && closure.toMs !== undefined && closure.toMs <= closure.fromMs)
      throw unprocessable('invalid-body', 'The end lies after the beginning.', [
        { pointer: '/toUtc', detail: 'After the beginning' },
      ]);
    await work.em.flush();
    await audit(work, person, {
      action: 'closure.change',
      entity: 'closure',
      entityId: id,
      summary: `Closure changed: ${closure.reason}`,
      details: { ...wish },
    });
    tellClosure(work, closure);
    return closure;
  });

/** Ends now what has begun; takes away what has not. */
export const endClosure = (
  deps: Deps,
  person: Person,
  { id, ifMatch }: { id: string; ifMatch: string },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const closure = await getClosure(work.em, id);
    checkTag(ifMatch, id, closure.version, 'The closure');
    closure.endedMs = work.nowMs;
    closure.endedByName = person.name;
    closure.toMs = Math.max(closure.fromMs, Math.min(closure.toMs ?? work.nowMs, work.nowMs));
    await work.em.flush();
    await audit(work, person, {
      action: closure.inhibit ? 'inhibit.end' : 'closure.end',
      entity: 'closure',
      entityId: id,
      summary: `${closure.inhibit ? 'Transmit inhibit' : 'Closure'} ended by ${person.name}: ${closure.reason}`,
    });
    tellClosure(work, closure);
  });

export const inhibitInForce = (em: EntityManager, stationId: string): Promise<Closure | null> =>
  em.findOne(Closure, { station: stationId, inhibit: true, endedMs: null });

/** Transmit inhibit, people at the array: in force at once, until somebody ends it by name. */
export const beginInhibit = (
  deps: Deps,
  person: Person,
  { stationId, reason }: { stationId: string; reason: string },
): Promise<Closure> =>
  inTransaction(deps, async (work) => {
    await getStation(work.em, stationId);
    if (!can(person, 'inhibit.transmit')) throw forbidden('Your role does not allow this.');
    const running = await inhibitInForce(work.em, stationId);
    if (running) throw conflict('inhibit', `Inhibited already by ${running.createdByName}.`);
    const closure = work.em.create(Closure, {
      id: randomUUID(),
      station: stationId,
      scope: 'station',
      scopeId: stationId,
      direction: 'transmit',
      fromMs: work.nowMs,
      toMs: null,
      reducedByDb: null,
      reason,
      inhibit: true,
      createdByName: person.name,
    });
    await work.em.flush();
    await audit(work, person, {
      action: 'inhibit.begin',
      entity: 'closure',
      entityId: closure.id,
      summary: `Transmit inhibit, people at the array: ${reason}`,
    });
    tellClosure(work, closure);
    return closure;
  });
