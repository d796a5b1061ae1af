import { z } from 'zod';
import { AzimuthDeg, ElevationDeg, Id, Name, Version, page } from './common.ts';

export const MaskKnot = z.strictObject({ azimuthDeg: AzimuthDeg, elevationDeg: ElevationDeg });
export const HorizonMask = z
  .array(MaskKnot)
  .min(1)
  .max(360)
  .superRefine((knots, issue) => {
    for (const [i, knot] of knots.entries()) {
      const before = knots[i - 1];
      if (before && knot.azimuthDeg <= before.azimuthDeg)
        issue.addIssue({
          code: 'custom',
          path: [i, 'azimuthDeg'],
          message: 'Azimuths of the mask grow from knot to knot',
        });
    }
  });
export const KeepOutSector = z.strictObject({
  label: Name,
  azimuthFromDeg: AzimuthDeg,
  azimuthToDeg: AzimuthDeg,
  elevationFromDeg: ElevationDeg,
  elevationToDeg: ElevationDeg,
});

const fields = {
  name: Name,
  latitudeDeg: z.number().min(-90).max(90),
  longitudeDeg: z.number().min(-180).max(180),
  heightM: z.number().min(-500).max(9000),
  timeZone: z.string().min(1).max(60),
  horizonMask: HorizonMask,
  receiveElevationFloorDeg: ElevationDeg,
  transmitElevationFloorDeg: ElevationDeg,
  keepOutSectors: z.array(KeepOutSector).max(50),
  guardTimeSeconds: z.number().int().min(0).max(600),
  freezeTimeSeconds: z.number().int().min(0).max(86_400),
  /** Minutes before the day begins by which the missions' signatures are due. */
  signOffCutOffMinutes: z.number().int().min(0).max(10_080),
  ut1MinusUtcSeconds: z.number().min(-0.9).max(0.9),
};
export const Station = z.strictObject({
  id: Id,
  version: Version,
  ...fields,
  transmitInhibit: z
    .strictObject({ sinceUtc: z.string(), by: z.string(), reason: z.string(), closureId: Id })
    .nullable(),
});
export type Station = z.infer<typeof Station>;
export const StationPage = page(Station);
export const CreateStation = z.strictObject(fields);
export type CreateStation = z.infer<typeof CreateStation>;
export const PatchStation = CreateStation.partial();
export type PatchStation = z.infer<typeof PatchStation>;
