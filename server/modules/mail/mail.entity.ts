import { defineEntity, p, type InferEntity } from '@mikro-orm/core';

export type MailState = 'waiting' | 'sent' | 'failed';

/** The outbox: written in the transaction of the change that concerns somebody, sent afterwards. */
export const MailRow = defineEntity({
  name: 'MailRow',
  tableName: 'mails',
  properties: {
    id: p.uuid().primary(),
    /** One mail for one event and person: the same key is never written twice. */
    dedupeKey: p.string().unique(),
    toAddress: p.string(),
    subject: p.string(),
    body: p.text(),
    state: p.string().$type<MailState>().default('waiting').index(),
    attempts: p.integer().default(0),
    nextAttemptMs: p.integer(),
    createdMs: p.integer().index(),
    sentMs: p.integer().nullable(),
    lastError: p.text().nullable(),
  },
});
export type MailRow = InferEntity<typeof MailRow>;
