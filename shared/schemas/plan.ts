import { z } from 'zod';
import { Day, Id, Instant, Note, Reason, page } from './common.ts';
import { RequirementResult } from './requirement.ts';
import { Violation } from './problem.ts';

export const PlanState = z.enum(['draft', 'in-review', 'approved', 'released', 'superseded']);
export type PlanState = z.infer<typeof PlanState>;

export const PlanAction = z.enum([
  'edit',
  'assign',
  'set-limit',
  'submit',
  'withdraw',
  'release',
  'revise',
  'sign',
  'operate',
]);
export type PlanAction = z.infer<typeof PlanAction>;

export const Leg = z.strictObject({ channelId: Id, fromUtc: Instant, toUtc: Instant });
export type Leg = z.infer<typeof Leg>;

export const Contact = z.strictObject({
  id: Id,
  passId: Id,
  satelliteId: Id,
  satelliteName: z.string(),
  missionId: Id,
  faceId: Id,
  receive: Leg,
  transmit: Leg.nullable(),
  locked: z.boolean(),
  emergency: z.boolean(),
  maxElevationDeg: z.number(),
  minScanLossDb: z.number().nullable(),
  maxScanLossDb: z.number().nullable(),
  minMarginDb: z.number().nullable(),
  elementSetId: Id,
  /** Seconds by which fresh elements shifted the pass beyond the guard time; null: within it. */
  driftSeconds: z.number().nullable(),
  note: z.string(),
});
export type Contact = z.infer<typeof Contact>;
/** A contact of a mission that the reader may not see: channels and times, nothing more. */
export const HiddenContact = z.strictObject({
  id: Id,
  faceId: Id,
  receive: Leg,
  transmit: Leg.nullable(),
  hidden: z.literal(true),
});
export type HiddenContact = z.infer<typeof HiddenContact>;
export const AnyContact = z.union([Contact, HiddenContact]);
export type AnyContact = z.infer<typeof AnyContact>;
export const isHidden = (contact: AnyContact): contact is HiddenContact => 'hidden' in contact;

export const SignOff = z.strictObject({
  missionId: Id,
  missionName: z.string(),
  state: z.enum(['pending', 'approved', 'unchanged', 'returned']),
  byName: z.string().nullable(),
  atUtc: Instant.nullable(),
  comment: z.string().nullable(),
});
export type SignOff = z.infer<typeof SignOff>;

export const Score = z.strictObject({
  contacts: z.number().int(),
  passes: z.number().int(),
  minutes: z.number(),
  requirementsMet: z.number().int(),
  requirementsShort: z.number().int(),
});
export type Score = z.infer<typeof Score>;

const summary = {
  id: Id,
  stationId: Id,
  day: Day,
  revision: z.number().int().min(1),
  version: z.number().int().min(1),
  state: PlanState,
  limitOfDayDb: z.number(),
  /** A change elsewhere breaks a rule of this plan. */
  needsAttention: z.string().nullable(),
  /** The reason of the last return, if the plan came back. */
  returned: z
    .strictObject({ missionId: Id, byName: z.string(), comment: z.string(), atUtc: Instant })
    .nullable(),
  updatedUtc: Instant,
  submittedBy: z.string().nullable(),
  cutOffUtc: Instant,
  score: Score,
  signOffs: z.array(SignOff),
  allowedActions: z.array(PlanAction),
  /** Missions in review that the reader may sign now. */
  signableMissionIds: z.array(Id),
};
export const PlanSummary = z.strictObject(summary);
export type PlanSummary = z.infer<typeof PlanSummary>;
export const PlanPage = page(PlanSummary);
export const Plan = z.strictObject({
  ...summary,
  contacts: z.array(AnyContact),
  requirements: z.array(RequirementResult),
  warnings: z.array(
    z.strictObject({
      code: z.string(),
      message: z.string(),
      contactIds: z.array(z.string()),
      fromUtc: Instant,
      toUtc: Instant,
    }),
  ),
});
export type Plan = z.infer<typeof Plan>;

export const PlanQuery = z.strictObject({
  stationId: Id.optional(),
  fromDay: Day.optional(),
  toDay: Day.optional(),
  state: PlanState.optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  cursor: z.string().max(200).optional(),
});
export const CreatePlan = z.strictObject({ stationId: Id, day: Day });
export type CreatePlan = z.infer<typeof CreatePlan>;
export const PatchPlan = z.strictObject({ limitOfDayDb: z.number().gt(0).max(20) });
export type PatchPlan = z.infer<typeof PatchPlan>;

export const PlanReason = z.strictObject({ reason: Note.optional() });
export const WithdrawPlan = z.strictObject({ reason: Note.optional() });
/** Missing signatures need a reason after the cut-off. */
export const ReleasePlan = z.strictObject({ reasonForMissingSignatures: Reason.optional() });
export const Sign = z.strictObject({
  missionId: Id,
  decision: z.enum(['approve', 'return']),
  comment: Note.default(''),
});
export type Sign = z.infer<typeof Sign>;

/** Why a pass is not on the plan, and what would free it. */
export const PassReason = z.strictObject({
  rule: z.string(),
  message: z.string(),
  contactIds: z.array(z.string()),
  fromUtc: Instant.nullable(),
  toUtc: Instant.nullable(),
  value: z.number().nullable(),
  limit: z.number().nullable(),
  unit: z.string().nullable(),
});
export const OpenPass = z.strictObject({
  passId: Id,
  satelliteId: Id,
  satelliteName: z.string(),
  missionId: Id,
  aosUtc: Instant,
  tcaUtc: Instant,
  losUtc: Instant,
  maxElevationDeg: z.number(),
  aosAzimuthDeg: z.number(),
  losAzimuthDeg: z.number(),
  /** `free`: it could be assigned now; `stopped`: a rule stops it; `unusable`: no usable window. */
  standing: z.enum(['free', 'stopped', 'unusable']),
  reasons: z.array(PassReason),
  wouldFree: z.array(
    z.strictObject({
      kind: z.string(),
      words: z.string(),
      /** Contact minutes that others lose by it. */
      costMinutes: z.number(),
      edits: z.array(z.unknown()),
    }),
  ),
});
export type OpenPass = z.infer<typeof OpenPass>;
export const OpenPassPage = page(OpenPass);

export const PlanFacts = z.strictObject({
  windows: z.array(
    z.strictObject({
      passId: Id,
      faceId: Id,
      direction: z.enum(['receive', 'transmit']),
      fromUtc: Instant,
      toUtc: Instant,
      minScanLossDb: z.number(),
      maxScanLossDb: z.number(),
      minMarginDb: z.number().nullable(),
    }),
  ),
  conflicts: z.array(
    z.strictObject({
      faceId: Id,
      direction: z.enum(['receive', 'transmit']),
      passIds: z.tuple([Id, Id]),
      fromUtc: Instant,
      toUtc: Instant,
      separationHpbw: z.number(),
      requiredHpbw: z.number(),
    }),
  ),
  busy: z.array(
    z.strictObject({
      channelId: Id,
      fromUtc: Instant,
      toUtc: Instant,
      contactId: Id.nullable(),
    }),
  ),
  closures: z.array(
    z.strictObject({
      id: Id,
      channelIds: z.array(Id),
      fromUtc: Instant,
      toUtc: Instant,
      reason: z.string(),
    }),
  ),
});
export type PlanFacts = z.infer<typeof PlanFacts>;

export const PlanChanges = z.strictObject({
  againstRevision: z.number().int(),
  added: z.array(AnyContact),
  removed: z.array(AnyContact),
  changed: z.array(z.strictObject({ before: AnyContact, after: AnyContact })),
});
export type PlanChanges = z.infer<typeof PlanChanges>;
export const ChangesQuery = z.strictObject({ against: z.coerce.number().int().min(1).optional() });

/** The answer of every call that changes a plan's contacts. */
export const Judgement = z.strictObject({ violations: z.array(Violation) });
