import { isHidden, type AnyContact, type Contact } from '../../../../shared/schemas/plan.ts';
import type { Interval } from '../../../../shared/time.ts';

/** One leg of a contact, in time. */
export interface PlanLeg extends Interval {
  /** Contact and direction. */
  id: string;
  contactId: string;
  direction: 'receive' | 'transmit';
  channelId: string;
  /** Channel of the other leg, null where there is none. */
  partnerChannelId: string | null;
  contact: AnyContact;
}

export const legInterval = (leg: { fromUtc: string; toUtc: string }): Interval => ({
  fromMs: Date.parse(leg.fromUtc),
  toMs: Date.parse(leg.toUtc),
});

export function planLegs(contacts: readonly AnyContact[]): PlanLeg[] {
  return contacts.flatMap((contact) => {
    const { id, receive, transmit } = contact;
    const legs: PlanLeg[] = [
      {
        ...legInterval(receive),
        id: `${id} receive`,
        contactId: id,
        direction: 'receive',
        channelId: receive.channelId,
        partnerChannelId: transmit?.channelId ?? null,
        contact,
      },
    ];
    if (transmit)
      legs.push({
        ...legInterval(transmit),
        id: `${id} transmit`,
        contactId: id,
        direction: 'transmit',
        channelId: transmit.channelId,
        partnerChannelId: receive.channelId,
        contact,
      });
    return legs;
  });
}

export const contactName = (contact: AnyContact): string =>
  isHidden(contact) ? 'Another mission' : contact.satelliteName;
export const contactMission = (contact: AnyContact): string | null =>
  isHidden(contact) ? null : contact.missionId;
/** The contact with all its details, or null where the reader sees channels and times only. */
export const openContact = (contact: AnyContact | null | undefined): Contact | null =>
  contact && !isHidden(contact) ? contact : null;
