import { parse } from 'csv-parse/sync';
import ICAL from 'ical.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PlanStory, seen } from '../support/plan-story.ts';
import type { Who } from '../support/small-world.ts';
import { predictSmallWorld, startTestApp, type TestApp } from '../support/test-app.ts';

const HOSTILE =
  '=HYPERLINK("http://x.example");\r\nBEGIN:VALARM,"quoted"; ünïcode 🛰 and a long tail '.repeat(2);

let test: TestApp;
let story: PlanStory;
beforeAll(async () => {
  test = await startTestApp();
  await predictSmallWorld(test);
  const operator = await test.as('operator');
  const id = test.satellites['Alder 1'] ?? '';
  const { body } = await operator.get(`/api/satellites/${id}`).expect(200);
  await operator
    .patch(`/api/satellites/${id}`)
    .set('if-match', `"${id}-v${(body as { version: number }).version}"`)
    .send({ name: HOSTILE.slice(0, 80) })
    .expect(200);
  story = await new PlanStory(test).begin('2026-12-03');
  await story.assign();
}, 60_000);
afterAll(() => test.close());

const get = async (path: string, who: Who = 'scheduler') =>
  (await test.as(who)).get(`/api/plans/${story.planId}${path}`).buffer(true);
const rows = (text: string): Record<string, string>[] =>
  parse(text, { columns: true, record_delimiter: '\r\n' });

describe('contacts.csv', () => {
  it('has a row a contact, CRLF, and no cell that begins a formula', async () => {
    const answer = await get('/contacts.csv');
    expect(answer.status).toBe(200);
    expect(answer.headers['content-type']).toContain('text/csv; charset=utf-8');
    const found = rows(answer.text);
    const contacts = seen((await story.read()).contacts);
    expect(found.map((row) => row.contact_id)).toEqual(contacts.map((one) => one.id));
    expect(answer.text.split('\r\n').length).toBeGreaterThan(contacts.length);
    for (const row of found)
      for (const value of Object.values(row)) expect(value).not.toMatch(/^[=+@]/);
    expect(found.some((row) => row.object_name?.startsWith("'=HYPERLINK"))).toBe(true);
  });

  it('gives a lead own missions only', async () => {
    const found = rows((await get('/contacts.csv', 'lead2')).text);
    expect(found.length).toBeGreaterThan(2);
    expect(new Set(found.map((row) => row.mission))).toEqual(new Set(['Birch']));
  });
});

describe('pointing.csv', () => {
  it('steers along each contact with the element set named, and radiates only in the leg', async () => {
    const answer = await get('/pointing.csv?stepSeconds=20');
    expect(answer.status).toBe(200);
    const found = rows(answer.text);
    const contact = seen((await story.read()).contacts).find((one) => one.transmit);
    const own = found.filter((row) => row.contact_id === contact?.id);
    expect(own.length).toBeGreaterThan(5);
    for (const row of own) {
      expect(Number(row.elevation_deg)).toBeGreaterThan(4);
      expect(Number(row.scan_loss_db)).toBeLessThanOrEqual(3.65);
      expect(row.element_set_epoch_utc).toBe('2026-12-01T03:00:00.000Z');
      const at = Date.parse(row.time_utc ?? '');
      const inLeg =
        at >= Date.parse(contact?.transmit?.fromUtc ?? '') &&
        at < Date.parse(contact?.transmit?.toUtc ?? '');
      expect(row.transmit_channel !== '').toBe(inLeg);
    }
    expect((await get('/pointing.csv?stepSeconds=0')).status).toBe(400);
  });

  it('radiates nothing while people are at the array', async () => {
    const operator = await test.as('operator');
    const path = `/api/stations/${test.stationId}/transmit-inhibit`;
    await operator.post(path).send({ reason: 'People at the array' }).expect(201);
    const found = rows((await get('/pointing.csv?stepSeconds=30')).text);
    expect(found.filter((row) => row.transmit_channel !== '')).toEqual([]);
    await operator.delete(path).expect(204);
  });
});

describe('calendar.ics', () => {
  const events = async (who: Who = 'scheduler') => {
    const answer = await get('/calendar.ics', who);
    expect(answer.headers['content-type']).toBe('text/calendar; charset=utf-8');
    // ical.js is a parser of its own and no part of the product.
    const calendar = new ICAL.Component(ICAL.parse(answer.text) as never);
    return {
      text: answer.text,
      events: calendar.getAllSubcomponents('vevent').map((one) => new ICAL.Event(one)),
    };
  };

  it('is read by an independent parser, hostile names and all', async () => {
    const { text, events: found } = await events();
    const contacts = seen((await story.read()).contacts);
    expect(found.map((one) => one.uid)).toEqual(
      contacts.map((one) => `contact-${one.id}@skysheaf.example`),
    );
    const [first] = found;
    expect(first?.startDate.toJSDate().toISOString()).toBe(contacts[0]?.receive.fromUtc);
    expect(first?.endDate.toJSDate().toISOString()).toBe(contacts[0]?.receive.toUtc);
    const hostile = found.find((one) => one.summary.includes('HYPERLINK'));
    expect(hostile?.summary).toContain('BEGIN:VALARM,"quoted"; ünïcode');
    expect(text).not.toMatch(/^BEGIN:VALARM/m);
    expect(text).not.toMatch(/[^\r]\n/);
    expect(text.endsWith('END:VCALENDAR\r\n')).toBe(true);
    for (const line of text.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
    expect(text.match(/^STATUS:/gm)?.length).toBe(contacts.length);
    expect(text).toContain('STATUS:TENTATIVE');
  });

  it('confirms what is released and cancels what a later revision took off', async () => {
    await story.submit();
    await story.signAll();
    await story.release();
    const [gone] = seen((await story.read()).contacts);
    const revised = await story.post('/operational-changes', {
      kind: 'cancel',
      contactId: gone?.id,
      reason: 'Receiver down',
    });
    story.planId = (revised.body as { id: string }).id;
    const { text, events: found } = await events();
    const cancelled = found.find((one) => one.uid.includes(gone?.id ?? '-'));
    expect(cancelled?.component.getFirstPropertyValue('status')).toBe('CANCELLED');
    expect(cancelled?.sequence).toBe(1);
    expect(text.match(/STATUS:CONFIRMED/g)?.length).toBe(found.length - 1);
    const own = await events('lead2');
    expect(own.events.every((one) => one.summary.startsWith('Birch'))).toBe(true);
  });
});
