import { z } from 'zod';
import { Direction, Id, Instant, Reason, Version, page } from './common.ts';

const fields = {
  faceId: Id,
  label: z.string().trim().min(1).max(12),
  direction: Direction,
  polarisation: z.enum(['rhcp', 'lhcp', 'linear', 'both']),
  bandwidthKhz: z.number().min(0.1).max(2_000_000),
  setUpSeconds: z.number().int().min(0).max(3600),
  tearDownSeconds: z.number().int().min(0).max(3600),
  inService: z.boolean(),
};
export const Channel = z.strictObject({ id: Id, version: Version, ...fields });
export type Channel = z.infer<typeof Channel>;
export const ChannelPage = page(Channel);
export const CreateChannel = z.strictObject(fields);
export type CreateChannel = z.infer<typeof CreateChannel>;
export const PatchChannel = CreateChannel.omit({ faceId: true }).partial();
export type PatchChannel = z.infer<typeof PatchChannel>;

const closure = {
  scope: z.enum(['station', 'face', 'channel']),
  scopeId: Id,
  direction: z.enum(['receive', 'transmit', 'both']),
  fromUtc: Instant,
  /** null: until further notice. */
  toUtc: Instant.nullable(),
  /** null: out of service; else the loss that enters the link. */
  reducedByDb: z.number().gt(0).max(40).nullable(),
};
export const Closure = z.strictObject({
  id: Id,
  version: Version,
  ...closure,
  reason: z.string(),
  stationId: Id,
  /** A transmit inhibit, people at the array: in force at once, ended by name. */
  inhibit: z.boolean(),
  createdBy: z.string(),
  endedUtc: Instant.nullable(),
});
export type Closure = z.infer<typeof Closure>;
export const ClosurePage = page(Closure);
export const CreateClosure = z
  .strictObject({ ...closure, reason: Reason })
  .refine((c) => c.toUtc === null || Date.parse(c.fromUtc) < Date.parse(c.toUtc), {
    path: ['toUtc'],
    message: 'The end lies after the beginning',
  });
export type CreateClosure = z.infer<typeof CreateClosure>;
export const PatchClosure = z.strictObject({
  fromUtc: Instant.optional(),
  toUtc: Instant.nullable().optional(),
  reason: Reason.optional(),
});
export type PatchClosure = z.infer<typeof PatchClosure>;

/** A contact that a closure hits, and what could be done: in words, and as edits of its plan. */
export const ClosureHit = z.strictObject({
  planId: Id,
  contactId: Id,
  missionId: Id,
  outcome: z.enum(['receive-still-good', 'other-channel', 'lost']),
  words: z.string(),
  edits: z.array(z.unknown()),
});
export type ClosureHit = z.infer<typeof ClosureHit>;
export const ClosureHits = z.strictObject({ items: z.array(ClosureHit) });
