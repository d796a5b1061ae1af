import { createTransport } from 'nodemailer';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { HOUR_MS } from '../../shared/time.ts';
import { inTransaction } from '../../server/deps.ts';
import { startLocalSmtp } from '../../server/modules/mail/local-smtp.ts';
import { MailRow } from '../../server/modules/mail/mail.entity.ts';
import { MailSender } from '../../server/modules/mail/mail-sender.ts';
import { enqueueMail } from '../../server/modules/mail/mail.service.ts';
import { NOW, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
let received: string[];
let smtp: Awaited<ReturnType<typeof startLocalSmtp>>;
beforeEach(async () => {
  test = await startTestApp();
  received = [];
  smtp = await startLocalSmtp((raw) => received.push(raw));
});
afterEach(async () => {
  await smtp.close();
  await test.close();
});

const write = (dedupeKey: string, subject = 'The plan waits') =>
  inTransaction(test.deps, (work) =>
    enqueueMail(work, { dedupeKey, to: 'lead@test.example', subject, body: 'Please sign it.' }),
  );
const mails = () => test.deps.orm.em.fork().find(MailRow, {}, { orderBy: { createdMs: 'asc' } });
const senderTo = (url: string) => new MailSender(test.deps, createTransport(url));

describe('the outbox', () => {
  it('sends over SMTP what was committed, once', async () => {
    await write('one');
    await write('one');
    const sender = senderTo(smtp.url);
    await Promise.all([sender.sendDue(), sender.sendDue()]);
    await sender.sendDue();
    expect(received).toHaveLength(1);
    expect(received[0]).toContain('To: lead@test.example');
    expect(received[0]).toContain('Please sign it.');
    expect((await mails()).map((mail) => mail.state)).toEqual(['sent']);
    await sender.stop();
  });

  it('keeps a mail while the server is down for an hour, and then delivers it', async () => {
    const dead = await startLocalSmtp();
    await dead.close();
    await write('down');
    const failing = senderTo(dead.url);
    let tries = 0;
    for (let atMs = NOW; atMs < NOW + HOUR_MS; atMs += 60_000) {
      test.clock.set(atMs);
      await failing.sendDue();
      tries = (await mails())[0]?.attempts ?? 0;
    }
    await failing.stop();
    const [waiting] = await mails();
    expect(waiting?.state).toBe('waiting');
    expect(waiting?.lastError).toMatch(/ECONNREFUSED/);
    // Doubling from ten seconds to a quarter of an hour: far fewer tries than minutes.
    expect(tries).toBeGreaterThan(5);
    expect(tries).toBeLessThan(15);
    test.clock.set(NOW + 2 * HOUR_MS);
    const sender = senderTo(smtp.url);
    await sender.sendDue();
    await sender.stop();
    expect(received).toHaveLength(1);
    expect((await mails())[0]).toMatchObject({ state: 'sent', lastError: null });
  });

  it('writes nothing when the change is rolled back', async () => {
    await expect(
      inTransaction(test.deps, async (work) => {
        await enqueueMail(work, { dedupeKey: 'x', to: 'a@b.example', subject: 's', body: 'b' });
        throw new Error('rolled back');
      }),
    ).rejects.toThrow('rolled back');
    expect(await mails()).toEqual([]);
  });

  it('lets no line break of a name begin another header', async () => {
    await write('hostile', 'Plan\r\nBcc: everybody@else.example\r\n');
    const sender = senderTo(smtp.url);
    await sender.sendDue();
    await sender.stop();
    expect(received[0]?.split('\r\n\r\n')[0]).not.toMatch(/^Bcc:/m);
  });

  it('is shown to administrators', async () => {
    await write('shown');
    const { body } = await (await test.as('admin')).get('/api/mails').expect(200);
    expect(body).toMatchObject({ items: [{ toAddress: 'lead@test.example', state: 'waiting' }] });
    await (await test.as('lead')).get('/api/mails').expect(403);
  });
});
