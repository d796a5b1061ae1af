import { z } from 'zod';
import { Id, Name, Version, page } from './common.ts';

export const Series = z.number().int().min(1).max(12);
const code = z.string().regex(/^[A-Z0-9]{2,6}$/, 'Two to six capital letters or digits');

export const Mission = z.strictObject({
  id: Id,
  version: Version,
  name: Name,
  code,
  /** Place in the list of mission colours; 7 and more get a second form of a colour. */
  series: Series,
  /** 1 is the highest. */
  priority: z.number().int().min(1).max(5),
  leadIds: z.array(Id),
  leadNames: z.array(z.string()),
  retired: z.boolean(),
});
export type Mission = z.infer<typeof Mission>;
export const MissionPage = page(Mission);

export const CreateMission = z.strictObject({
  name: Name,
  code,
  series: Series,
  priority: z.number().int().min(1).max(5),
  leadIds: z.array(Id).max(20),
});
export type CreateMission = z.infer<typeof CreateMission>;
export const PatchMission = CreateMission.partial().extend({ retired: z.boolean().optional() });
export type PatchMission = z.infer<typeof PatchMission>;

export const StandingConsent = z.strictObject({ given: z.boolean() });
