import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { ContactModel, Direction } from '../../../shared/schedule/model.ts';
import { toIso } from '../../../shared/time.ts';
import type { ClosureHit } from '../../../shared/schemas/channel.ts';
import { closuresOf } from '../../../shared/schedule/closures.ts';
import { overlaps } from '../../../shared/time.ts';
import type { World } from './world.ts';

const isHit = (world: World, closureId: string, leg: ContactModel['receive'] | null): boolean => {
  const channel = leg && world.context.channels.get(leg.channelId);
  if (!leg || !channel) return false;
  return closuresOf(world.day, channel).some(
    (one) => one.closure.id === closureId && overlaps(one, leg),
  );
};

/** The same contact on another channel of its face, at the same times. */
const onOtherChannel = (
  world: World,
  {
    contacts,
    contact,
    direction,
  }: { contacts: ContactModel[]; contact: ContactModel; direction: Direction },
): ContactModel | null => {
  const leg = contact[direction];
  if (!leg) return null;
  const others = world.day.channels.filter(
    (one) =>
      one.direction === direction && one.faceId === contact.faceId && one.id !== leg.channelId,
  );
  for (const channel of others) {
    const tried = { ...contact, [direction]: { ...leg, channelId: channel.id } };
    const broken = judgeContacts(
      world.context,
      contacts.map((one) => (one.id === contact.id ? tried : one)),
    ).some((violation) => violation.contactIds.includes(contact.id));
    if (!broken) return tried;
  }
  return null;
};

/** What a closure does to the contacts of a plan, each with the proposal that keeps most of it. */
export const closureHits = (
  world: World,
  { contacts, closureId, planId }: { contacts: ContactModel[]; closureId: string; planId: string },
): ClosureHit[] =>
  contacts.flatMap((contact): ClosureHit[] => {
    const receiveHit = isHit(world, closureId, contact.receive);
    const transmitHit = isHit(world, closureId, contact.transmit);
    if (!receiveHit && !transmitHit) return [];
    const direction: Direction = receiveHit ? 'receive' : 'transmit';
    const moved = onOtherChannel(world, { contacts, contact, direction });
    const target = moved?.[direction]?.channelId ?? null;
    const label = target && world.context.channels.get(target)?.label;
    const outcome = moved ? 'other-channel' : receiveHit ? 'lost' : 'receive-still-good';
    const name = world.context.satellites.get(contact.satelliteId)?.name ?? '';
    const at = toIso(contact.receive.fromMs).slice(11, 16);
    return [
      {
        planId,
        contactId: contact.id,
        missionId: contact.missionId,
        outcome,
        words: {
          'other-channel': `${name} at ${at} can move to ${label ?? ''} at the same times.`,
          'receive-still-good': `${name} at ${at} loses its uplink; the downlink is still good.`,
          lost: `${name} at ${at} is lost: no other channel is free.`,
        }[outcome],
        edits: moved
          ? [{ op: 'change', contactId: contact.id, [direction]: { channelId: target } }]
          : receiveHit
            ? [{ op: 'remove', contactId: contact.id }]
            : [{ op: 'change', contactId: contact.id, transmit: null }],
      },
    ];
  });
