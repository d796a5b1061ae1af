import type { Response } from 'supertest';
import { expect } from 'vitest';
import type { AnyContact, Contact, Plan } from '../../shared/schemas/plan.ts';
import { isHidden } from '../../shared/schemas/plan.ts';
import type { Who } from './small-world.ts';
import type { TestApp } from './test-app.ts';

/** The life of a plan over HTTP, step by step, as the client walks it. */
export class PlanStory {
  readonly test: TestApp;
  planId = '';

  constructor(test: TestApp) {
    this.test = test;
  }

  async begin(day: string, who: Who = 'scheduler'): Promise<this> {
    const agent = await this.test.as(who);
    const { body } = await agent
      .post('/api/plans')
      .send({ stationId: this.test.stationId, day })
      .expect(201);
    this.planId = (body as Plan).id;
    return this;
  }

  async read(who: Who = 'scheduler'): Promise<Plan> {
    const { body } = await (await this.test.as(who)).get(`/api/plans/${this.planId}`).expect(200);
    return body as Plan;
  }

  async tag(): Promise<string> {
    const { version } = await this.read();
    return `"${this.planId}-v${version}"`;
  }

  async post(path: string, body: object = {}, who: Who = 'scheduler'): Promise<Response> {
    const agent = await this.test.as(who);
    return agent
      .post(`/api/plans/${this.planId}${path}`)
      .set('if-match', await this.tag())
      .send(body);
  }

  async assign(who: Who = 'scheduler'): Promise<this> {
    const answer = await this.post('/assignment-runs', { timeLimitSeconds: 10 }, who);
    expect(answer.status).toBe(202);
    const { runId } = answer.body as { runId: string };
    await this.test.app.jobs.settled(runId);
    const { body } = await (await this.test.as(who)).get(`/api/runs/${runId}`).expect(200);
    expect(body).toMatchObject({ state: 'succeeded', result: { applied: true } });
    return this;
  }

  async expectStep(path: string, body: object, state: Plan['state'], who: Who = 'scheduler') {
    const answer = await this.post(path, body, who);
    expect([path, answer.status, (answer.body as { detail?: string }).detail]).toEqual([
      path,
      200,
      undefined,
    ]);
    expect((answer.body as Plan).state).toBe(state);
  }

  submit(state: Plan['state'] = 'in-review', who: Who = 'scheduler') {
    return this.expectStep('/submit', {}, state, who);
  }

  sign(who: Who, mission: 'alder' | 'birch', decision: 'approve' | 'return', comment = '') {
    const missionId = this.test.missions[mission];
    return this.post('/sign-offs', { missionId, decision, comment }, who);
  }

  async signAll(): Promise<void> {
    expect((await this.sign('lead', 'alder', 'approve')).status).toBe(200);
    expect((await this.sign('lead2', 'birch', 'approve')).status).toBe(200);
  }

  async release(): Promise<void> {
    await this.expectStep('/release', {}, 'released');
  }
}

export const seen = (contacts: AnyContact[]): Contact[] =>
  contacts.flatMap((contact) => (isHidden(contact) ? [] : [contact]));
