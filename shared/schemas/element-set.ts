import { z } from 'zod';
import { Id, Instant, Note, page } from './common.ts';
import { CatalogNumber } from './satellite.ts';

export const RefusedSet = z.strictObject({
  line: z.number().int(),
  column: z.number().int(),
  code: z.string(),
  reason: z.string(),
});
export const AcceptedSet = z.strictObject({
  elementSetId: Id.nullable(),
  line: z.number().int(),
  catalogNumber: CatalogNumber,
  name: z.string().nullable(),
  epochUtc: Instant,
  satelliteId: Id.nullable(),
  unchanged: z.boolean(),
});
export const UnknownSet = z.strictObject({
  line: z.number().int(),
  catalogNumber: CatalogNumber,
  name: z.string().nullable(),
  epochUtc: Instant,
});

export const ElementSetUpload = z.strictObject({
  /** null in a dry run. */
  id: Id.nullable(),
  fileName: z.string(),
  sizeBytes: z.number().int(),
  sha256: z.string(),
  uploadedUtc: Instant,
  uploadedBy: z.string(),
  format: z.string(),
  accepted: z.array(AcceptedSet),
  refused: z.array(RefusedSet),
  unknown: z.array(UnknownSet),
  runId: Id.nullable(),
});
export type ElementSetUpload = z.infer<typeof ElementSetUpload>;

export const ElementSetUploadSummary = z.strictObject({
  id: Id,
  fileName: z.string(),
  sizeBytes: z.number().int(),
  sha256: z.string(),
  uploadedUtc: Instant,
  uploadedBy: z.string(),
  acceptedCount: z.number().int(),
  refusedCount: z.number().int(),
  unknownCount: z.number().int(),
});
export const ElementSetUploadPage = page(ElementSetUploadSummary);
export const UploadQuery = z.strictObject({
  dryRun: z.enum(['true', 'false']).default('false'),
  useFromUtc: Instant.optional(),
});

export const ElementSet = z.strictObject({
  id: Id,
  satelliteId: Id.nullable(),
  satelliteName: z.string().nullable(),
  missionId: Id.nullable(),
  catalogNumber: CatalogNumber,
  name: z.string().nullable(),
  epochUtc: Instant,
  ageHours: z.number(),
  line1: z.string(),
  line2: z.string(),
  state: z.enum(['in-use', 'candidate', 'former', 'withdrawn', 'unassigned']),
  useFromUtc: Instant.nullable(),
  uploadId: Id,
  uploadedUtc: Instant,
  uploadedBy: z.string(),
});
export type ElementSet = z.infer<typeof ElementSet>;
export const ElementSetPage = page(ElementSet);
export const ElementSetQuery = z.strictObject({
  satelliteId: Id.optional(),
  state: ElementSet.shape.state.optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  cursor: z.string().max(200).optional(),
});
export const WithdrawElementSet = z.strictObject({ reason: Note.min(3) });
