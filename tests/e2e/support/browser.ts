import { AxeBuilder } from '@axe-core/playwright';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { expect } from 'vitest';
import { ensureChromium } from '../../support/chromium.mts';

/** Without the background flags Chromium talks to hosts that a closed network does not have. */
const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const launch = (): Promise<Browser> =>
  chromium.launch({ executablePath: ensureChromium(), args: FLAGS });

export type Account = 'operator' | 'scheduler' | 'lead' | 'lead2' | 'admin';

/** A person at a screen of his or her own; anything on the console is a finding. */
export class Person {
  readonly page: Page;
  readonly context: BrowserContext;
  readonly complaints: string[] = [];

  private constructor(context: BrowserContext, page: Page) {
    this.context = context;
    this.page = page;
    page.on('console', (message) => {
      if (message.type() === 'error' && !isExpected(message.text()))
        this.complaints.push(`${page.url()}: ${message.text()}`);
    });
    page.on('pageerror', (error) => this.complaints.push(`${page.url()}: ${error.message}`));
  }

  static async signIn(
    browser: Browser,
    { url, who, theme = 'light' }: { url: string; who: Account; theme?: 'light' | 'dark' },
  ): Promise<Person> {
    const context = await browser.newContext({
      baseURL: url,
      viewport: { width: 1440, height: 900 },
      colorScheme: theme,
      // Far from UTC on purpose: a time that follows the browser's zone shows at once.
      timezoneId: 'Asia/Tokyo',
    });
    const person = new Person(context, await context.newPage());
    const { page } = person;
    await page.goto('/sign-in');
    await page.getByLabel('E-mail').fill(`${who}@skysheaf.example`);
    await page.getByLabel('Password').fill('many-beams-one-array');
    await page.locator('form').getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.waitForURL((address) => !address.pathname.startsWith('/sign-in'));
    return person;
  }

  async leave(): Promise<void> {
    await this.context.close();
    expect(this.complaints).toEqual([]);
  }

  /** The accessibility rules of WCAG 2.2 A and AA, by axe. */
  async expectAccessible(): Promise<void> {
    const { violations } = await new AxeBuilder({ page: this.page })
      .withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
      .analyze();
    expect(
      violations.map((one) => `${this.page.url()} ${one.id}: ${one.nodes[0]?.target.join(' ')}`),
    ).toEqual([]);
  }
}

/** Chromium prints every answer of 4xx; those that a story provokes are no faults of the page. */
const isExpected = (text: string): boolean =>
  /Failed to load resource: the server responded with a status of (401|403|409|412|422)/.test(text);
