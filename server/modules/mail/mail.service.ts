import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { Work } from '../../deps.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { MailRow } from './mail.entity.ts';

export interface MailWish {
  /** Names the event and the person; a second mail with the same key is not written. */
  dedupeKey: string;
  to: string;
  subject: string;
  body: string;
}

/** Puts a mail into the outbox, in the transaction of the change that it tells of. */
export const enqueueMail = async ({ em, nowMs, tell }: Work, mail: MailWish): Promise<void> => {
  const id = randomUUID();
  await em.execute(
    `insert or ignore into mails (id, dedupe_key, to_address, subject, body, state, attempts, next_attempt_ms, created_ms)
     values (?, ?, ?, ?, ?, 'waiting', 0, ?, ?)`,
    [id, mail.dedupeKey, mail.to, oneLine(mail.subject), mail.body, nowMs, nowMs],
  );
  tell({ topic: 'mail', id, version: 1 });
};

/** A line break in a header would begin another header. */
const oneLine = (text: string): string => text.replace(/[\r\n]+/g, ' ').slice(0, 200);

export const listMails = (em: EntityManager, wish: PageWish) =>
  listPage<MailRow>(em, MailRow, wish, { sort: 'createdMs', descending: true });
