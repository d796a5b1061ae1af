import { toIso } from '../../time.ts';
import type { ContactModel, LegModel } from '../model.ts';

/** A leg as edits name it: channel and instants, RFC 3339 UTC. */
export interface EditLeg {
  channelId: string;
  fromUtc: string;
  toUtc: string;
}

/** Edits of a plan in the shape in which the service takes them. */
export type PlanEdit =
  | { op: 'assign'; passId: string; receive: EditLeg; transmit: EditLeg | null }
  | { op: 'change'; contactId: string; receive: EditLeg; transmit: EditLeg | null }
  | { op: 'remove'; contactId: string };

const editLeg = ({ channelId, fromMs, toMs }: LegModel): EditLeg => ({
  channelId,
  fromUtc: toIso(fromMs),
  toUtc: toIso(toMs),
});

const legs = ({
  receive,
  transmit,
}: ContactModel): { receive: EditLeg; transmit: EditLeg | null } => ({
  receive: editLeg(receive),
  transmit: transmit && editLeg(transmit),
});

export const assignEdit = (contact: ContactModel): PlanEdit => ({
  op: 'assign',
  passId: contact.passId,
  ...legs(contact),
});

export const changeEdit = (contact: ContactModel): PlanEdit => ({
  op: 'change',
  contactId: contact.id,
  ...legs(contact),
});

export const removeEdit = (contact: ContactModel): PlanEdit => ({
  op: 'remove',
  contactId: contact.id,
});
