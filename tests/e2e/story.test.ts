import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { moveEpoch } from '../../server/seeders/write-tle.ts';
import { readElementSets } from '../../shared/orbit/element-reader.ts';
import { DAY_MS, dayOf, HOUR_MS } from '../../shared/time.ts';
import { launch, Person, type Account } from './support/browser.ts';
import { startServer, type RunningServer } from './support/server.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

/** The demo's fleet with an epoch of an hour before. */
const freshFile = (epochMs: number): Buffer =>
  Buffer.from(
    readElementSets(readFileSync('tle/demo.tle'), 'demo.tle')
      .accepted.map((set) => {
        const { line1, line2 } = moveEpoch(set, epochMs);
        return `${set.name ?? ''}\n${line1}\n${line2}\n`;
      })
      .join(''),
  );

const press = (page: Page, name: string | RegExp) =>
  page
    .getByRole('button', { name, exact: typeof name === 'string' })
    .first()
    .click();
const inDialog = (page: Page, name: string) =>
  page.getByRole('dialog').getByRole('button', { name, exact: true }).click();
const dialogGone = (page: Page) => page.getByRole('dialog').waitFor({ state: 'hidden' });

// The same story at an ordinary hour, and ten minutes before midnight, when "tomorrow" is about to change.
describe.each(['2026-12-01T10:20:00.000Z', '2026-12-01T23:50:00.000Z'])('at %s', (clockStart) => {
  let server: RunningServer;
  const people = new Map<Account, Person>();
  beforeAll(async () => {
    server = await startServer(clockStart);
  });
  afterAll(async () => {
    for (const person of people.values()) await person.leave();
    await server.stop();
    people.clear();
  });
  const as = async (who: Account): Promise<Page> => {
    const known = people.get(who) ?? (await Person.signIn(browser, { url: server.url, who }));
    people.set(who, known);
    return known.page;
  };

  const day = dayOf(Date.parse(clockStart) + 4 * DAY_MS);
  let planPath = '';
  const state = async (page: Page, word: string): Promise<void> => {
    await page.goto(planPath);
    await page.getByText(word, { exact: true }).first().waitFor();
  };
  const submit = async (): Promise<void> => {
    const page = await as('scheduler');
    await page.goto(planPath);
    await press(page, 'Submit for sign-off');
    await inDialog(page, 'Submit for sign-off');
    await dialogGone(page);
    await state(page, 'In review');
  };
  /** One lead answers for each mission that waits for it; returns how many answers that were. */
  const sign = async (who: Account, decision: 'Approve plan' | 'Return with a reason') => {
    const page = await as(who);
    let answers = 0;
    for (;;) {
      await page.goto(`${planPath}/sign-off`);
      await page.getByRole('heading', { name: 'Sign-off' }).waitFor();
      await page.waitForLoadState('networkidle');
      const button = page.getByRole('button', { name: decision, exact: true });
      if ((await button.count()) === 0) return answers;
      const accept = page.getByLabel(/^I accept/);
      if ((await accept.count()) > 0) await accept.check();
      if (decision === 'Return with a reason')
        await page.getByLabel('Comment').fill('One more contact before noon');
      const answer = page.waitForResponse((one) => one.url().endsWith('/sign-offs'));
      await button.click();
      expect((await answer).status()).toBe(200);
      answers += 1;
      if (decision === 'Return with a reason') return answers;
    }
  };

  it('an operator loads a file of fresh element sets', async () => {
    const page = await as('operator');
    await page.goto('/element-sets/upload');
    await page.locator('input[type=file]').setInputFiles({
      name: 'morning.tle',
      mimeType: 'text/plain',
      buffer: freshFile(Date.parse(clockStart) - HOUR_MS),
    });
    await press(page, /^Accept 24 element sets/);
    await page
      .getByText(/24 element sets/)
      .first()
      .waitFor();
    await page.goto('/element-sets');
    await page.getByText('Osket 9').first().waitFor();
  });

  it('a scheduler begins the plan, lets it be assigned, and moves a contact by hand', async () => {
    const page = await as('scheduler');
    await page.goto('/plans');
    const row = page.getByRole('row').filter({ hasText: String(Number(day.slice(8))) });
    await row
      .filter({ hasText: 'December 2026' })
      .getByRole('button', { name: /^Begin the plan/ })
      .first()
      .click();
    await page.waitForURL(/\/plans\/[0-9a-f-]{36}/);
    planPath = new URL(page.url()).pathname;
    await press(page, 'Assign the open passes');
    await inDialog(page, 'Assign');
    await page
      .getByRole('button', { name: 'Assign again', exact: true })
      .waitFor({ timeout: 90_000 });
    await page
      .getByRole('dialog')
      .getByText(/Proven|at most/)
      .first()
      .waitFor();
    await page.getByRole('dialog').getByRole('button', { name: 'Close' }).last().click();

    await page.goto(`${planPath}?view=table`);
    const contacts = page.getByRole('table', { name: 'Contacts of the plan' });
    await contacts
      .getByRole('button', { name: /^Brindle/ })
      .first()
      .click();
    await press(page, /^Move/);
    const channel = page.getByRole('dialog').getByLabel('Channel').first();
    const before = await channel.inputValue();
    const values = await channel
      .locator('option')
      .evaluateAll((options) => options.map((one) => (one as HTMLOptionElement).value));
    const move = page.getByRole('dialog').getByRole('button', { name: 'Move contact' });
    let isMoved = false;
    for (const value of values.filter((one) => one !== before)) {
      await channel.selectOption(value);
      await page.waitForTimeout(1200);
      if (!(await move.isEnabled())) continue;
      await move.click();
      await dialogGone(page);
      isMoved = true;
      break;
    }
    expect(isMoved).toBe(true);
    // The move can be taken back, and done again.
    await press(page, 'Take back the last edit');
    await page.getByRole('button', { name: 'Do it again', exact: true }).click();
  });

  it('it is submitted, returned with a reason, submitted again and approved', async () => {
    await submit();
    expect(await sign('lead', 'Return with a reason')).toBe(1);
    const page = await as('scheduler');
    await state(page, 'Returned');
    await page
      .getByText(/One more contact before noon/)
      .first()
      .waitFor();
    await submit();
    expect(await sign('lead', 'Approve plan')).toBeGreaterThan(0);
    expect(await sign('lead2', 'Approve plan')).toBeGreaterThan(0);
    await state(page, 'Approved');
  });

  it('and released', async () => {
    const page = await as('scheduler');
    await page.goto(planPath);
    await press(page, 'Release plan');
    await inDialog(page, 'Release plan');
    await dialogGone(page);
    await state(page, 'Released');
    const operator = await as('operator');
    await operator.goto('/plans');
    await operator.getByRole('row').filter({ hasText: 'Released' }).first().waitFor();
  });
});
