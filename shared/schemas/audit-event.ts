import { z } from 'zod';
import { Id, Instant, page } from './common.ts';

export const AuditEvent = z.strictObject({
  id: Id,
  atUtc: Instant,
  actorName: z.string(),
  action: z.string(),
  entity: z.string(),
  entityId: z.string(),
  missionId: Id.nullable(),
  summary: z.string(),
  details: z.record(z.string(), z.unknown()),
});
export type AuditEvent = z.infer<typeof AuditEvent>;
export const AuditEventPage = page(AuditEvent);
export const AuditQuery = z.strictObject({
  entity: z.string().max(40).optional(),
  entityId: z.string().max(60).optional(),
  action: z.string().max(60).optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  cursor: z.string().max(200).optional(),
});

export const Mail = z.strictObject({
  id: Id,
  toAddress: z.string(),
  subject: z.string(),
  body: z.string(),
  state: z.enum(['waiting', 'sent', 'failed']),
  attempts: z.number().int(),
  createdUtc: Instant,
  sentUtc: Instant.nullable(),
  lastError: z.string().nullable(),
});
export type Mail = z.infer<typeof Mail>;
export const MailPage = page(Mail);

export const Health = z.strictObject({
  status: z.enum(['ok', 'starting']),
  serverTimeUtc: Instant,
});
