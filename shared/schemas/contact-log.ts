import { z } from 'zod';
import { Id, Instant, Note } from './common.ts';

export const PutContactLog = z.strictObject({
  outcome: z.enum(['served', 'partly', 'lost', 'not-attempted']),
  cause: Note.default(''),
  minutes: z.number().min(0).max(1440).nullable().default(null),
  volumeMbit: z.number().min(0).max(100_000_000).nullable().default(null),
  note: Note.default(''),
});
export type PutContactLog = z.infer<typeof PutContactLog>;
export const ContactLog = PutContactLog.extend({
  contactId: Id,
  byName: z.string(),
  atUtc: Instant,
});
export type ContactLog = z.infer<typeof ContactLog>;
export const ContactLogList = z.strictObject({ items: z.array(ContactLog) });
