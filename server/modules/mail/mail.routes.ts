import { toIso } from '../../../shared/time.ts';
import { MailPage, type Mail } from '../../../shared/schemas/audit-event.ts';
import { PageQuery } from '../../../shared/schemas/common.ts';
import { reader, type Deps } from '../../deps.ts';
import { route } from '../../middleware/route.ts';
import type { MailRow } from './mail.entity.ts';
import { listMails } from './mail.service.ts';

const present = (row: MailRow): Mail => ({
  id: row.id,
  toAddress: row.toAddress,
  subject: row.subject,
  body: row.body,
  state: row.state,
  attempts: row.attempts,
  createdUtc: toIso(row.createdMs),
  sentUtc: row.sentMs ? toIso(row.sentMs) : null,
  lastError: row.lastError ?? null,
});

export const mailRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/mails',
    summary: 'The outbox, newest first',
    access: 'session',
    action: 'see.mails',
    query: PageQuery,
    answer: MailPage,
    handler: async ({ query }) => {
      const found = await listMails(reader(deps), query);
      return { body: { items: found.items.map(present), nextCursor: found.nextCursor } };
    },
  }),
];
