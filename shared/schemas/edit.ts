import { z } from 'zod';
import { Id, Instant, Note, Reason } from './common.ts';
import { AnyContact, Contact } from './plan.ts';
import { Violation } from './problem.ts';

const LegWish = z.strictObject({
  channelId: Id,
  fromUtc: Instant.optional(),
  toUtc: Instant.optional(),
});
const LegChange = LegWish.partial({ channelId: true });

/** Times left out: the longest usable part of the pass on that channel. */
export const AssignBody = z.strictObject({
  passId: Id,
  receive: LegWish,
  transmit: LegWish.nullable().optional(),
  locked: z.boolean().optional(),
  note: Note.optional(),
});
export const ChangeBody = z.strictObject({
  receive: LegChange.optional(),
  transmit: LegChange.nullable().optional(),
  locked: z.boolean().optional(),
  note: Note.optional(),
});

export const Edit = z.discriminatedUnion('op', [
  AssignBody.extend({ op: z.literal('assign') }),
  ChangeBody.extend({ op: z.literal('change'), contactId: Id }),
  z.strictObject({ op: z.literal('remove'), contactId: Id }),
  /** Brings a removed contact back under its own identity; `inverse` of a removal holds one. */
  z.strictObject({ op: z.literal('restore'), contactId: Id }).extend({
    receive: LegWish.required(),
    transmit: LegWish.required().nullable(),
    locked: z.boolean(),
  }),
]);
export type Edit = z.infer<typeof Edit>;

export const EditPlan = z.strictObject({ edits: z.array(Edit).min(1).max(500) });
export type EditPlan = z.infer<typeof EditPlan>;
export const EditQuery = z.strictObject({ dryRun: z.enum(['true', 'false']).default('false') });
export const EditResult = z.strictObject({
  version: z.number().int(),
  contacts: z.array(AnyContact),
  removedIds: z.array(Id),
  /** Edits that undo this one. */
  inverse: z.array(Edit),
  violations: z.array(Violation),
});
export type EditResult = z.infer<typeof EditResult>;

/** Repair of the running day, released at once. */
export const OperationalChange = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('move-leg'),
    contactId: Id,
    direction: z.enum(['receive', 'transmit']),
    channelId: Id,
    reason: Reason,
    caller: z.string().trim().max(80).default(''),
  }),
  z.strictObject({
    kind: z.literal('shorten'),
    contactId: Id,
    fromUtc: Instant.optional(),
    toUtc: Instant.optional(),
    reason: Reason,
    caller: z.string().trim().max(80).default(''),
  }),
  z.strictObject({
    kind: z.literal('cancel'),
    contactId: Id,
    reason: Reason,
    caller: z.string().trim().max(80).default(''),
  }),
  z.strictObject({
    kind: z.literal('add-urgent'),
    passId: Id,
    receive: LegWish,
    transmit: LegWish.nullable().optional(),
    /** Contacts that give way; only under the reason *spacecraft emergency*. */
    displaces: z.array(Id).max(20).default([]),
    spacecraftEmergency: z.boolean().default(false),
    reason: Reason,
    caller: z.string().trim().max(80).default(''),
  }),
]);
export type OperationalChange = z.infer<typeof OperationalChange>;

export const NextContact = z.strictObject({
  passId: Id,
  faceId: Id,
  fromUtc: Instant,
  toUtc: Instant,
  maxElevationDeg: z.number(),
  receiveChannelId: Id.nullable(),
  transmitChannelId: Id.nullable(),
  transmitFromUtc: Instant.nullable(),
  transmitToUtc: Instant.nullable(),
  planId: Id.nullable(),
  displaces: z.array(Contact.pick({ id: true, satelliteName: true, missionId: true })),
  words: z.string(),
});
export type NextContact = z.infer<typeof NextContact>;
export const NextContacts = z.strictObject({ items: z.array(NextContact) });
export const NextContactQuery = z.strictObject({
  stationId: Id,
  uplink: z.enum(['true', 'false']).default('false'),
});
