import { z } from 'zod';
import { Day, Id, Instant, Reason, UplinkNeed, Version, page } from './common.ts';

const lines = {
  missionId: Id,
  appliesTo: z.enum(['each', 'together']),
  /** null: at all stations. */
  stationId: Id.nullable(),
  what: z.enum(['contacts', 'minutes', 'gap', 'volume']),
  /** Contacts, minutes or Mbit; for a gap `most` is the longest allowed gap in minutes. */
  least: z.number().min(0).max(100_000).nullable(),
  most: z.number().min(0).max(100_000).nullable(),
  minimumDurationSeconds: z.number().int().min(0).max(86_400),
  uplink: UplinkNeed,
  leastUplinkMinutes: z.number().min(0).max(1440).nullable(),
  minimumElevationDeg: z.number().min(0).max(90).nullable(),
  marginFloorDb: z.number().min(-10).max(60).nullable(),
  hoursUtc: z.tuple([z.number().min(0).max(24), z.number().min(0).max(24)]).nullable(),
  weekdays: z.array(z.number().int().min(1).max(7)).max(7).nullable(),
  scanLossLimitDb: z.number().min(0).max(20).nullable(),
};

export const Requirement = z.strictObject({ id: Id, version: Version, ...lines });
export type Requirement = z.infer<typeof Requirement>;
export const RequirementPage = page(Requirement);
export const CreateRequirement = z.strictObject(lines).superRefine((line, issue) => {
  if (line.least === null && line.most === null)
    issue.addIssue({ code: 'custom', path: ['least'], message: 'Give a least or a most' });
  if (line.what === 'gap' && line.most === null)
    issue.addIssue({ code: 'custom', path: ['most'], message: 'A gap needs its longest length' });
  if (line.least !== null && line.most !== null && line.least > line.most)
    issue.addIssue({ code: 'custom', path: ['most'], message: 'The most is under the least' });
});
export type CreateRequirement = z.infer<typeof CreateRequirement>;
export const PatchRequirement = z.strictObject(lines).omit({ missionId: true }).partial();

export const Request = z.strictObject({
  id: Id,
  version: Version,
  missionId: Id,
  satelliteId: Id,
  kind: z.enum(['pass', 'minutes', 'none']),
  passId: Id.nullable(),
  minutes: z.number().min(1).max(1440).nullable(),
  uplink: UplinkNeed,
  fromUtc: Instant,
  toUtc: Instant,
  priority: z.number().int().min(1).max(5),
  reason: z.string(),
  state: z.enum(['open', 'withdrawn']),
});
export type Request = z.infer<typeof Request>;
export const RequestPage = page(Request);
export const CreateRequest = Request.omit({ id: true, version: true, state: true }).extend({
  reason: Reason,
});
export type CreateRequest = z.infer<typeof CreateRequest>;
export const PatchRequest = z.strictObject({ state: z.literal('withdrawn') });

/** What a mission asked and what a plan gives. */
export const RequirementResult = z.strictObject({
  requirementId: Id,
  missionId: Id,
  satelliteId: Id.nullable(),
  label: z.string(),
  asked: z.number().nullable(),
  given: z.number().nullable(),
  unit: z.string(),
  met: z.boolean(),
  note: z.string(),
});
export type RequirementResult = z.infer<typeof RequirementResult>;
export const RequirementDay = Day;
