import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { LegModel, UsableWindow } from '../../../shared/schedule/model.ts';
import { intersect, roundInward, SECOND_MS, type Interval } from '../../../shared/time.ts';
import type { WishedContact } from './contact-store.ts';
import type { World } from './world.ts';

export interface Retimed {
  contactId: string;
  satelliteId: string;
  missionId: string;
  /** Seconds by which the pass moved. */
  shiftSeconds: number;
  before: Interval;
  after: Interval;
}
export interface RetimeOutcome {
  contacts: WishedContact[];
  retimed: Retimed[];
  /** Contacts that moved beyond their guard time and could not follow: somebody's task. */
  drifted: string[];
}

interface Question {
  world: World;
  contacts: readonly WishedContact[];
  /** TCA of the predictions that contacts were planned on, ms. */
  plannedTcaMs: ReadonlyMap<string, number>;
  nowMs: number;
}

/** Whole seconds by which the pass moved since the contact was planned; 0 within the guard time. */
const shiftOf = ({ world, plannedTcaMs }: Question, contact: WishedContact): number => {
  const pass = world.context.passes.get(contact.passId);
  const planned = plannedTcaMs.get(contact.predictionId);
  if (!pass || planned === undefined || pass.predictionId === contact.predictionId) return 0;
  const satellite = world.context.satellites.get(contact.satelliteId);
  const guard = satellite?.guardTimeSeconds ?? world.day.station.guardTimeSeconds;
  const shift = (pass.tcaMs - planned) / SECOND_MS;
  return Math.abs(shift) > guard ? Math.round(shift) : 0;
};

/** The leg moved along and kept inside the usable windows of its face; null when nothing of it is left. */
const moved = (
  leg: LegModel,
  shiftMs: number,
  windows: readonly UsableWindow[],
): LegModel | null => {
  const wished = { fromMs: leg.fromMs + shiftMs, toMs: leg.toMs + shiftMs };
  const parts = windows.flatMap((window) => {
    const part = intersect(window, wished);
    return (part && roundInward(part)) ?? [];
  });
  const [best] = parts.sort((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs));
  return best ? { channelId: leg.channelId, ...best } : null;
};

const follow = (
  { world }: Question,
  contact: WishedContact,
  shiftSeconds: number,
): WishedContact | null => {
  const windows = world.facts.windows.filter(
    (one) => one.passId === contact.passId && one.faceId === contact.faceId,
  );
  const shiftMs = shiftSeconds * SECOND_MS;
  const on = (direction: UsableWindow['direction']) =>
    windows.filter((one) => one.direction === direction);
  const receive = moved(contact.receive, shiftMs, on('receive'));
  const transmit = contact.transmit && moved(contact.transmit, shiftMs, on('transmit'));
  if (!receive || (contact.transmit && !transmit)) return null;
  const inside = transmit && intersect(transmit, receive);
  const pass = world.context.passes.get(contact.passId);
  return {
    ...contact,
    predictionId: pass?.predictionId ?? contact.predictionId,
    receive,
    transmit: transmit && inside ? { channelId: transmit.channelId, ...inside } : transmit,
  };
};

/**
 * Contacts follow their passes (DESIGN section 4): within the guard time nothing changes; beyond it a contact moves
 * along if it still lies in its window, keeps its minimum and clashes with nobody; else it is drifted. What has begun
 * stays.
 */
export const retimeContacts = (question: Question): RetimeOutcome => {
  const { world, nowMs } = question;
  const contacts = [...question.contacts];
  const retimed: Retimed[] = [];
  const drifted: string[] = [];
  for (const [index, contact] of question.contacts.entries()) {
    const shiftSeconds = shiftOf(question, contact);
    if (shiftSeconds === 0 || contact.receive.fromMs <= nowMs) continue;
    const wish = follow(question, contact, shiftSeconds);
    const tried = contacts.with(index, wish ?? contact);
    const clashes = judgeContacts(world.context, tried).some((violation) =>
      violation.contactIds.includes(contact.id),
    );
    if (!wish || clashes) {
      drifted.push(contact.id);
      continue;
    }
    contacts[index] = wish;
    retimed.push({
      contactId: contact.id,
      satelliteId: contact.satelliteId,
      missionId: contact.missionId,
      shiftSeconds,
      before: { fromMs: contact.receive.fromMs, toMs: contact.receive.toMs },
      after: { fromMs: wish.receive.fromMs, toMs: wish.receive.toMs },
    });
  }
  return { contacts, retimed, drifted };
};
