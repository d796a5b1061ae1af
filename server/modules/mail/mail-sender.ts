import type { Transporter } from 'nodemailer';
import { MINUTE_MS, SECOND_MS } from '../../../shared/time.ts';
import type { Deps } from '../../deps.ts';
import { MailRow } from './mail.entity.ts';

const BATCH = 20;
const FIRST_RETRY_MS = 10 * SECOND_MS;
const LONGEST_RETRY_MS = 15 * MINUTE_MS;

/** Doubles from ten seconds to a quarter of an hour; a mail is never given up. */
export const retryDelayMs = (attempts: number): number =>
  Math.min(LONGEST_RETRY_MS, FIRST_RETRY_MS * 2 ** Math.min(attempts, 20));

/** Sends what waits in the outbox. A mail is marked sent only after the server took it. */
export class MailSender {
  readonly #deps: Deps;
  readonly #transport: Transporter;
  #timer: NodeJS.Timeout | null = null;
  #running: Promise<void> | null = null;
  #unsubscribe: () => void = () => {};

  constructor(deps: Deps, transport: Transporter) {
    this.#deps = deps;
    this.#transport = transport;
  }

  start(): void {
    this.#unsubscribe = this.#deps.bus.subscribe((event) => {
      if (event.topic === 'mail') void this.sendDue();
    });
    this.#timer = setInterval(() => void this.sendDue(), FIRST_RETRY_MS);
    this.#timer.unref();
    void this.sendDue();
  }

  async stop(): Promise<void> {
    this.#unsubscribe();
    if (this.#timer) clearInterval(this.#timer);
    await this.#running;
    this.#transport.close();
  }

  /** One pass over the outbox; calls made meanwhile join it. */
  sendDue(): Promise<void> {
    this.#running ??= this.#sendAll().finally(() => {
      this.#running = null;
    });
    return this.#running;
  }

  async #sendAll(): Promise<void> {
    try {
      for (;;) {
        const em = this.#deps.orm.em.fork();
        const due = await em.find(
          MailRow,
          { state: 'waiting', nextAttemptMs: { $lte: this.#deps.clock.now() } },
          { orderBy: { createdMs: 'asc' }, limit: BATCH },
        );
        for (const mail of due) await this.#sendOne(mail);
        await em.flush();
        if (due.length < BATCH) return;
      }
    } catch (error) {
      this.#deps.log.warn({ err: error }, 'the outbox could not be worked on');
    }
  }

  async #sendOne(mail: MailRow): Promise<void> {
    const nowMs = this.#deps.clock.now();
    try {
      await this.#transport.sendMail({
        from: this.#deps.env.MAIL_FROM,
        to: { name: '', address: mail.toAddress },
        subject: mail.subject,
        text: mail.body,
        // The receiver recognises a second delivery of the same mail by it.
        messageId: `<${mail.id}@skysheaf.example>`,
      });
      mail.state = 'sent';
      mail.sentMs = nowMs;
      mail.lastError = null;
    } catch (error) {
      mail.attempts += 1;
      mail.nextAttemptMs = nowMs + retryDelayMs(mail.attempts);
      mail.lastError = error instanceof Error ? error.message.slice(0, 300) : 'not sent';
    }
  }
}
