import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { Satellite } from '../satellites/satellite.entity.ts';

export interface RefusedLine {
  line: number;
  column: number;
  code: string;
  reason: string;
}
export interface AcceptedLine {
  elementSetId: string | null;
  line: number;
  catalogNumber: number;
  name: string | null;
  epochMs: number;
  satelliteId: string | null;
  unchanged: boolean;
}

/** A file as it came, and what became of it. The same bytes are never stored twice. */
export const ElementSetUpload = defineEntity({
  name: 'ElementSetUpload',
  tableName: 'element_set_uploads',
  properties: {
    id: p.uuid().primary(),
    fileName: p.string(),
    sizeBytes: p.integer(),
    sha256: p.string().unique(),
    bytes: p.blob().lazy(true, false),
    format: p.string(),
    accepted: p.json().$type<AcceptedLine[]>(),
    refused: p.json().$type<RefusedLine[]>(),
    unknown: p.json().$type<AcceptedLine[]>(),
    runId: p.uuid().nullable(),
    uploadedMs: p.integer().index(),
    uploadedById: p.uuid().nullable(),
    uploadedByName: p.string(),
  },
});
export type ElementSetUpload = InferEntity<typeof ElementSetUpload>;

export type ElementSetState = 'in-use' | 'candidate' | 'former' | 'withdrawn' | 'unassigned';

/** One element set. It can wait (`useFromMs`), be in use, be withdrawn; it is never edited. */
export const ElementSet = defineEntity({
  name: 'ElementSet',
  tableName: 'element_sets',
  indexes: [{ properties: ['satellite', 'epochMs'] }],
  properties: {
    id: p.uuid().primary(),
    upload: () => p.manyToOne(ElementSetUpload),
    satellite: () => p.manyToOne(Satellite).nullable(),
    catalogNumber: p.integer().index(),
    name: p.string().nullable(),
    /** Exact, may be a fraction of a millisecond. */
    epochMs: p.float(),
    line1: p.string(),
    line2: p.string(),
    state: p.string().$type<ElementSetState>().default('unassigned'),
    useFromMs: p.integer().nullable(),
    createdMs: p.integer(),
    withdrawnReason: p.text().nullable(),
  },
});
export type ElementSet = InferEntity<typeof ElementSet>;
