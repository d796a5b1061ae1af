import { createHash, randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { judgeTrialPropagation } from '../../../shared/orbit/element-acceptance.ts';
import { readElementSets, type ReadElementSet } from '../../../shared/orbit/element-reader.ts';
import { can } from '../../../shared/policy.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import { AppError, badRequest } from '../../errors.ts';
import type { UploadedFile } from '../../middleware/route.ts';
import { audit } from '../audit/audit.service.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import {
  ElementSet,
  ElementSetUpload,
  type AcceptedLine,
  type RefusedLine,
} from './element-set.entity.ts';
import { chooseInUse } from './element-set.service.ts';

interface Judged {
  accepted: (AcceptedLine & { set: ReadElementSet })[];
  unknown: (AcceptedLine & { set: ReadElementSet })[];
  refused: RefusedLine[];
}
export interface UploadOutcome {
  upload: ElementSetUpload;
  /** The same bytes came before. */
  repeated: boolean;
}
interface UploadWish {
  file: UploadedFile;
  dryRun: boolean;
  useFromMs: number | null;
}

/** Acceptance: fleet, rights, age and a trial propagation, with the clock. */
const judge = async (
  em: EntityManager,
  { person, nowMs, sets }: { person: Person; nowMs: number; sets: ReadElementSet[] },
): Promise<Judged> => {
  const judged: Judged = { accepted: [], unknown: [], refused: [] };
  const satellites = await em.find(Satellite, {
    catalogNumber: { $in: sets.map((set) => set.catalogNumber) },
    retired: false,
  });
  for (const set of sets) {
    const satellite = satellites.find((one) => one.catalogNumber === set.catalogNumber) ?? null;
    const refusal = judgeTrialPropagation(set, nowMs) ?? judgeRight(person, set, satellite);
    if (refusal) {
      judged.refused.push({ line: set.line, column: 1, ...refusal });
      continue;
    }
    const stored = satellite
      ? await em.findOne(ElementSet, {
          satellite: satellite.id,
          line1: set.line1,
          line2: set.line2,
          state: { $ne: 'withdrawn' },
        })
      : null;
    const line = {
      elementSetId: stored?.id ?? null,
      line: set.line,
      catalogNumber: set.catalogNumber,
      name: set.name,
      epochMs: set.epochMs,
      satelliteId: satellite?.id ?? null,
      unchanged: stored !== null,
      set,
    };
    if (satellite) judged.accepted.push(line);
    else judged.unknown.push(line);
  }
  return judged;
};

const judgeRight = (person: Person, set: ReadElementSet, satellite: Satellite | null) =>
  can(person, 'upload.element-sets', { missionId: satellite?.mission.id ?? null })
    ? null
    : {
        code: 'NOT_YOURS',
        reason: `${set.catalogNumber} is not a satellite of your missions, so its set is left to the operators.`,
      };

const bare = (lines: Judged['accepted']): AcceptedLine[] =>
  lines.map(({ set: _set, ...line }) => line);

const storeSets = async (
  { em, nowMs }: Work,
  uploadId: string,
  { lines, useFromMs }: { lines: Judged['accepted']; useFromMs: number | null },
): Promise<void> => {
  for (const line of lines) {
    if (line.unchanged) continue;
    line.elementSetId = randomUUID();
    em.create(ElementSet, {
      id: line.elementSetId,
      upload: uploadId,
      satellite: line.satelliteId,
      catalogNumber: line.catalogNumber,
      name: line.name,
      epochMs: line.epochMs,
      line1: line.set.line1,
      line2: line.set.line2,
      state: 'unassigned',
      useFromMs,
      createdMs: nowMs,
    });
  }
  await em.flush();
};

const unusable = (refused: RefusedLine[], unreadable: boolean): AppError =>
  new AppError(
    422,
    unreadable ? 'file-unreadable' : 'nothing-usable',
    unreadable
      ? 'The file cannot be read as element sets; nothing of it was stored.'
      : 'Nothing in the file can be used; no set was stored.',
    {
      errors: refused.map((one) => ({
        pointer: `/file/lines/${one.line}`,
        detail: one.reason,
        code: one.code,
        line: one.line,
        column: one.column,
      })),
    },
  );

/**
 * Reads and judges a file and stores what is good, set by set, in one transaction; the file itself is kept
 * whatever became of it. Throws 422 when it cannot be read or holds nothing usable.
 */
export const uploadElementSets = async (
  deps: Deps,
  person: Person,
  { file, dryRun, useFromMs }: UploadWish,
): Promise<UploadOutcome> => {
  if (file.bytes.length > 2 * 1024 * 1024) throw badRequest('The file is larger than 2 MiB.');
  const sha256 = createHash('sha256').update(file.bytes).digest('hex');
  const reading = readElementSets(file.bytes, file.fileName);
  const judged = await judge(reader(deps), {
    person,
    nowMs: deps.clock.now(),
    sets: reading.unreadable ? [] : reading.accepted,
  });
  const refused = [...reading.refused, ...judged.refused].sort((a, b) => a.line - b.line);
  const isUseless = judged.accepted.length + judged.unknown.length === 0;

  const outcome = await inTransaction(deps, async (work) => {
    const before = await work.em.findOne(ElementSetUpload, { sha256 });
    if (before && !dryRun) return { upload: before, repeated: true };
    const upload = work.em.create(ElementSetUpload, {
      id: randomUUID(),
      fileName: file.fileName,
      sizeBytes: file.bytes.length,
      sha256,
      bytes: Buffer.from(file.bytes),
      format: reading.format,
      accepted: [],
      refused,
      unknown: [],
      uploadedMs: work.nowMs,
      uploadedById: person.id,
      uploadedByName: person.name,
    });
    if (dryRun) {
      upload.accepted = bare(judged.accepted);
      upload.unknown = bare(judged.unknown);
      work.em.clear();
      return { upload, repeated: false };
    }
    await storeUpload(work, person, { upload, judged, useFromMs });
    return { upload, repeated: false };
  });
  if (isUseless && (!outcome.repeated || outcome.upload.accepted.length === 0))
    throw unusable(outcome.upload.refused, reading.unreadable);
  return outcome;
};

const storeUpload = async (
  work: Work,
  person: Person,
  {
    upload,
    judged,
    useFromMs,
  }: { upload: ElementSetUpload; judged: Judged; useFromMs: number | null },
): Promise<void> => {
  await work.em.flush();
  await storeSets(work, upload.id, {
    lines: [...judged.accepted, ...judged.unknown],
    useFromMs,
  });
  upload.accepted = bare(judged.accepted);
  upload.unknown = bare(judged.unknown);
  await work.em.flush();
  const changed: string[] = [];
  for (const { satelliteId } of judged.accepted)
    if (satelliteId && (await chooseInUse(work, satelliteId))) changed.push(satelliteId);
  await audit(work, person, {
    action:
      judged.accepted.length + judged.unknown.length > 0 ? 'elements.upload' : 'elements.refuse',
    entity: 'element-set-upload',
    entityId: upload.id,
    summary: `${upload.fileName}: ${judged.accepted.length} accepted, ${upload.refused.length} refused, ${judged.unknown.length} unknown`,
    details: { sha256: upload.sha256, sizeBytes: upload.sizeBytes },
  });
  if (changed.length === 0) return;
  // The run gets its name here, so that the answer can tell it before the prediction has begun.
  upload.runId = randomUUID();
  await work.em.flush();
  work.tell({
    topic: 'elements',
    id: upload.id,
    version: 1,
    satelliteIds: changed,
    runId: upload.runId,
  });
};
