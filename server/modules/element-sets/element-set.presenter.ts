import type {
  ElementSet as ElementSetAnswer,
  ElementSetUpload as UploadAnswer,
} from '../../../shared/schemas/element-set.ts';
import { HOUR_MS, toIso } from '../../../shared/time.ts';
import type { AcceptedLine, ElementSet, ElementSetUpload } from './element-set.entity.ts';

const presentLine = (line: AcceptedLine) => ({
  elementSetId: line.elementSetId,
  line: line.line,
  catalogNumber: line.catalogNumber,
  name: line.name,
  epochUtc: toIso(line.epochMs),
  satelliteId: line.satelliteId,
  unchanged: line.unchanged,
});

export const presentUpload = (upload: ElementSetUpload, dryRun: boolean): UploadAnswer => ({
  id: dryRun ? null : upload.id,
  fileName: upload.fileName,
  sizeBytes: upload.sizeBytes,
  sha256: upload.sha256,
  uploadedUtc: toIso(upload.uploadedMs),
  uploadedBy: upload.uploadedByName,
  format: upload.format,
  accepted: upload.accepted.map(presentLine),
  refused: upload.refused.map(({ line, column, code, reason }) => ({ line, column, code, reason })),
  unknown: upload.unknown.map(({ line, catalogNumber, name, epochMs }) => ({
    line,
    catalogNumber,
    name,
    epochUtc: toIso(epochMs),
  })),
  runId: dryRun ? null : (upload.runId ?? null),
});

export const presentUploadSummary = (upload: ElementSetUpload) => ({
  id: upload.id,
  fileName: upload.fileName,
  sizeBytes: upload.sizeBytes,
  sha256: upload.sha256,
  uploadedUtc: toIso(upload.uploadedMs),
  uploadedBy: upload.uploadedByName,
  acceptedCount: upload.accepted.length,
  refusedCount: upload.refused.length,
  unknownCount: upload.unknown.length,
});

export const presentElementSet = (set: ElementSet, nowMs: number): ElementSetAnswer => ({
  id: set.id,
  satelliteId: set.satellite?.id ?? null,
  satelliteName: set.satellite?.name ?? null,
  missionId: set.satellite?.mission.id ?? null,
  catalogNumber: set.catalogNumber,
  name: set.name ?? null,
  epochUtc: toIso(set.epochMs),
  ageHours: (nowMs - set.epochMs) / HOUR_MS,
  line1: set.line1,
  line2: set.line2,
  state: set.state,
  useFromUtc: set.useFromMs == null ? null : toIso(set.useFromMs),
  uploadId: set.upload.id,
  uploadedUtc: toIso(set.createdMs),
  uploadedBy: set.upload.uploadedByName,
});
