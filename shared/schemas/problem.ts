import { z } from 'zod';
import { Instant } from './common.ts';

/** One broken plan rule (DESIGN section 3), with the contacts, the time and the number that decides. */
export const Violation = z.strictObject({
  rule: z.enum([
    'channel-busy',
    'outside-window',
    'channel-unfit',
    'beams-too-close',
    'transmit-limit',
    'closure',
    'too-short',
    'duplicate',
    'hard-end',
  ]),
  message: z.string(),
  contactIds: z.array(z.string()),
  fromUtc: Instant,
  toUtc: Instant,
  value: z.number().nullable(),
  limit: z.number().nullable(),
  unit: z.string().nullable(),
});
export type Violation = z.infer<typeof Violation>;

/** RFC 9457 problem details. Clients switch on `code`, never on text. */
export const Problem = z.looseObject({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  code: z.string(),
  requestId: z.string().optional(),
  errors: z
    .array(z.looseObject({ pointer: z.string(), detail: z.string(), code: z.string().optional() }))
    .optional(),
  violations: z.array(Violation).optional(),
});
export type Problem = z.infer<typeof Problem>;
