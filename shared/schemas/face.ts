import { z } from 'zod';
import { AzimuthDeg, Id, Name, Version, page } from './common.ts';

export const Taper = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('uniform') }),
  z.strictObject({
    kind: z.literal('taylor'),
    sidelobeDb: z.number().min(-60).max(-15),
    nBar: z.number().int().min(2).max(12),
  }),
]);
const Band = z
  .tuple([z.number().min(100).max(60_000), z.number().min(100).max(60_000)])
  .refine(([from, to]) => from < to, { message: 'The band ends above its beginning' });
const LossTable = z
  .array(z.tuple([z.number().min(0).max(90), z.number().min(0).max(40)]))
  .min(2)
  .max(91)
  .superRefine((rows, issue) => {
    for (const [i, row] of rows.entries()) {
      const before = rows[i - 1];
      if (i === 0 && row[0] !== 0)
        issue.addIssue({ code: 'custom', path: [0, 0], message: 'The first row stands at 0 deg' });
      if (before && row[0] <= before[0])
        issue.addIssue({ code: 'custom', path: [i, 0], message: 'Scan angles grow row by row' });
      if (before && row[1] < before[1])
        issue.addIssue({ code: 'custom', path: [i, 1], message: 'The loss never falls' });
    }
  });

export const FaceRadio = z.strictObject({
  radiationEfficiency: z.number().gt(0).max(1),
  antennaNoiseK: z.number().min(0).max(1000),
  feedLossDb: z.number().min(0).max(20),
  lnaNoiseFigureDb: z.number().min(0).max(20),
  lnaGainDb: z.number().min(0).max(80),
  dividerWays: z.number().int().min(1).max(64),
  dividerExcessDb: z.number().min(0).max(20),
  secondNoiseFigureDb: z.number().min(0).max(30),
  wattsPerElement: z.number().min(0).max(1000),
  transmitLossDb: z.number().min(0).max(20),
  outputBackOffDb: z.number().min(0).max(20),
  otherLossDb: z.number().min(0).max(20),
});

const fields = {
  stationId: Id,
  label: Name,
  boresightAzimuthDeg: AzimuthDeg,
  boresightElevationDeg: z.number().min(0).max(90),
  rollDeg: z.number().min(-180).max(180),
  elementsX: z.number().int().min(2).max(512),
  elementsY: z.number().int().min(2).max(512),
  pitchXMm: z.number().gt(0).max(2000),
  pitchYMm: z.number().gt(0).max(2000),
  receiveTaper: Taper,
  transmitTaper: Taper,
  scanLossExponent: z.number().min(0.5).max(4),
  scanLossTable: LossTable.nullable(),
  normalLimitDb: z.number().gt(0).max(20),
  hardEndDb: z.number().gt(0).max(20),
  architecture: z.enum(['digital', 'hybrid', 'analog']),
  receiveBandMhz: Band,
  transmitBandMhz: Band.nullable(),
  transmitBeamLimit: z.number().int().min(0).max(256),
  requiredIsolationDb: z.number().min(0).max(60),
  sidelobeFloorDb: z.number().min(-80).max(0),
  radio: FaceRadio,
};
export const Face = z.strictObject({ id: Id, version: Version, ...fields });
export type Face = z.infer<typeof Face>;
export const FacePage = page(Face);
export const CreateFace = z
  .strictObject(fields)
  .refine((face) => face.normalLimitDb <= face.hardEndDb, {
    path: ['normalLimitDb'],
    message: 'The normal limit lies within the hard end',
  });
export type CreateFace = z.infer<typeof CreateFace>;
export const PatchFace = z.strictObject(fields).omit({ stationId: true }).partial();
export type PatchFace = z.infer<typeof PatchFace>;
