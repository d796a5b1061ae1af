import { z } from 'zod';

/** Building blocks of every request and answer. Objects are strict: an unknown member is an error, not silence. */

export const Id = z.uuid().meta({ description: 'Made by the server' });
/** RFC 3339, UTC, `Z`. */
export const Instant = z.iso
  .datetime()
  .meta({ description: 'RFC 3339 UTC with Z, e.g. 2026-12-02T09:37:50.000Z' });
export const Day = z.iso.date().meta({ description: 'A UTC day, e.g. 2026-12-02' });
export const Name = z.string().trim().min(1).max(80);
export const Note = z.string().trim().max(2000);
export const Reason = z.string().trim().min(3, 'Say why, in a few words').max(2000);

export const AzimuthDeg = z.number().min(0).max(360);
export const ElevationDeg = z.number().min(-10).max(90);

export const PageQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(500).default(100),
  cursor: z.string().max(200).optional(),
});

export const page = <T extends z.ZodType>(item: T) =>
  z.strictObject({ items: z.array(item), nextCursor: z.string().nullable() });

export const Direction = z.enum(['receive', 'transmit']);
export type Direction = z.infer<typeof Direction>;
export const Polarisation = z.enum(['rhcp', 'lhcp', 'linear']);
export type Polarisation = z.infer<typeof Polarisation>;
export const UplinkNeed = z.enum(['required', 'wanted', 'none']);

export const IdParams = z.strictObject({ id: Id });
export const Version = z.number().int().min(1);
