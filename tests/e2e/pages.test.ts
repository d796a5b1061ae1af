import { mkdirSync } from 'node:fs';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launch, Person, type Account } from './support/browser.ts';
import { startServer, type RunningServer } from './support/server.ts';

let server: RunningServer;
let browser: Browser;
beforeAll(async () => {
  [server, browser] = await Promise.all([startServer('2026-12-01T10:20:00.000Z'), launch()]);
});
afterAll(async () => {
  await browser.close();
  await server.stop();
});

interface Item {
  id: string;
  state?: string;
}
const first = async (person: Person, path: string): Promise<Item[]> => {
  const { items } = await person.page.evaluate(
    async (address) => (await fetch(address)).json() as Promise<{ items: Item[] }>,
    path,
  );
  return items;
};

/** Every page of the product, each seen by a role that has much to do there. */
const addresses: Record<Account, (person: Person) => Promise<string[]>> = {
  scheduler: async (person) => {
    const plans = await first(person, '/api/plans');
    const draft = plans.find((plan) => plan.state === 'draft')?.id ?? '';
    return [
      '/',
      '/plans',
      ...plans.map((plan) => `/plans/${plan.id}`),
      ...['sky', 'map', 'table'].map((view) => `/plans/${draft}?view=${view}`),
      '/passes',
      '/nowhere',
    ];
  },
  operator: async (person) => {
    const [satellite] = await first(person, '/api/satellites');
    return [
      '/',
      '/shift',
      '/element-sets',
      '/element-sets/upload',
      '/satellites',
      `/satellites/${satellite?.id ?? ''}`,
    ];
  },
  lead: async (person) => {
    const [mission] = await first(person, '/api/missions');
    const plans = await first(person, '/api/plans');
    const inReview = plans.find((plan) => plan.state === 'in-review')?.id ?? '';
    return [
      '/',
      `/plans/${inReview}`,
      `/plans/${inReview}/sign-off`,
      '/missions',
      `/missions/${mission?.id ?? ''}`,
      '/users',
    ];
  },
  admin: async (person) => {
    const [station] = await first(person, '/api/stations');
    return ['/', '/stations', `/stations/${station?.id ?? ''}`, '/users', '/audit', '/mails'];
  },
  lead2: () => Promise.resolve(['/']),
};

const settle = async ({ page }: Person): Promise<void> => {
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page.waitForLoadState('networkidle');
};

describe.each(['scheduler', 'lead', 'admin', 'operator'] as const)('as %s', (who) => {
  it.each(['light', 'dark'] as const)(
    'every page is accessible and its console clean, %s',
    async (theme) => {
      const person = await Person.signIn(browser, { url: server.url, who, theme });
      for (const address of await addresses[who](person)) {
        await person.page.goto(address);
        await settle(person);
        expect(await person.page.getByRole('heading', { level: 1 }).count()).toBe(1);
        await person.expectAccessible();
      }
      await person.leave();
    },
  );
});

describe('the pictures of the README', () => {
  it('are made from the demo', async () => {
    const folder = process.env.PICTURES;
    if (!folder) return;
    mkdirSync(folder, { recursive: true });
    for (const theme of ['light', 'dark'] as const) {
      const person = await Person.signIn(browser, { url: server.url, who: 'scheduler', theme });
      const plans = await first(person, '/api/plans');
      const draft = plans.find((plan) => plan.state === 'draft')?.id ?? '';
      for (const [name, address] of [
        ['plan', `/plans/${draft}`],
        ['sky', `/plans/${draft}?view=sky`],
        ['shift', '/shift'],
      ] as const) {
        await person.page.goto(address);
        await settle(person);
        await person.page.waitForTimeout(1500);
        await person.page.screenshot({ path: `${folder}/${name}-${theme}.png` });
      }
      await person.context.close();
    }
  });
});
