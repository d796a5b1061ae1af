import { createHash } from 'node:crypto';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import type { RequirementResult } from '../../../shared/schedule/score/requirements.ts';
import { SECOND_MS } from '../../../shared/time.ts';

interface PartContact {
  contactId: string;
  satelliteId: string;
  passId: string;
  uplink: boolean;
  fromMs: number;
  toMs: number;
  uplinkFromMs: number | null;
  uplinkToMs: number | null;
}

/** A mission's own part of a plan, as it is signed: services, times and results, never channel numbers. */
export interface MissionPart {
  contacts: PartContact[];
  results: {
    requirementId: string;
    satelliteId: string | null;
    asked: number | null;
    met: boolean;
  }[];
}

export const missionPart = (
  missionId: string,
  contacts: readonly ContactModel[],
  results: readonly RequirementResult[],
): MissionPart => ({
  contacts: contacts
    .filter((contact) => contact.missionId === missionId)
    .map((contact) => ({
      contactId: contact.id,
      satelliteId: contact.satelliteId,
      passId: contact.passId,
      uplink: contact.transmit !== null,
      fromMs: contact.receive.fromMs,
      toMs: contact.receive.toMs,
      uplinkFromMs: contact.transmit?.fromMs ?? null,
      uplinkToMs: contact.transmit?.toMs ?? null,
    }))
    .sort((a, b) => a.fromMs - b.fromMs || a.contactId.localeCompare(b.contactId)),
  results: results
    .filter((result) => result.missionId === missionId)
    .map(({ requirementId, satelliteId, asked, met }) => ({
      requirementId,
      satelliteId,
      asked,
      met,
    }))
    .sort((a, b) =>
      `${a.requirementId}${a.satelliteId}`.localeCompare(`${b.requirementId}${b.satelliteId}`),
    ),
});

/** What a signature is bound to; shown in the audit trail. */
export const digestOf = (part: MissionPart): string =>
  createHash('sha256').update(JSON.stringify(part)).digest('hex');

const within = (a: number | null, b: number | null, guardMs: number): boolean =>
  a === null || b === null ? a === b : Math.abs(a - b) <= guardMs;

/** A signature carries over while the mission's part is the same, times within the guard time. */
export const partStands = (
  signed: MissionPart,
  now: MissionPart,
  guardTimeSeconds: number,
): boolean => {
  const guardMs = guardTimeSeconds * SECOND_MS;
  if (JSON.stringify(signed.results) !== JSON.stringify(now.results)) return false;
  if (signed.contacts.length !== now.contacts.length) return false;
  const byId = new Map(signed.contacts.map((contact) => [contact.contactId, contact]));
  return now.contacts.every((contact) => {
    const before = byId.get(contact.contactId);
    return (
      before !== undefined &&
      before.satelliteId === contact.satelliteId &&
      before.passId === contact.passId &&
      before.uplink === contact.uplink &&
      within(before.fromMs, contact.fromMs, guardMs) &&
      within(before.toMs, contact.toMs, guardMs) &&
      within(before.uplinkFromMs, contact.uplinkFromMs, guardMs) &&
      within(before.uplinkToMs, contact.uplinkToMs, guardMs)
    );
  });
};
