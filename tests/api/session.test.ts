import jwt from 'jsonwebtoken';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DEMO_SECRET } from '../../server/env.ts';
import { HOUR_MS } from '../../shared/time.ts';
import { emailOf, PASSWORD } from '../support/small-world.ts';
import { NOW, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

const signIn = (email: string, password: string) =>
  test.anyone().post('/api/session').send({ email, password });

describe('signing in', () => {
  it('sets an httpOnly, SameSite cookie and tells who came in', async () => {
    const answer = await signIn(emailOf('lead'), PASSWORD).expect(201);
    const cookie = String(answer.headers['set-cookie']);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    expect(answer.body).toMatchObject({
      user: { email: emailOf('lead'), roles: ['lead'], leadsMissionIds: [test.missions.alder] },
    });
    expect(JSON.stringify(answer.body)).not.toContain('argon2');
  });

  it('answers the same for an unknown account and a wrong password', async () => {
    const [unknown, wrong] = [
      await signIn('nobody@test.example', PASSWORD).expect(401),
      await signIn(emailOf('lead'), 'not this one').expect(401),
    ];
    const strip = ({ requestId: _id, ...rest }: Record<string, unknown>) => rest;
    expect(strip(unknown.body as Record<string, unknown>)).toEqual(
      strip(wrong.body as Record<string, unknown>),
    );
    expect(unknown.headers['content-type']).toContain('application/problem+json');
  });

  it('says nobody without a session, and 422 for a body that is none', async () => {
    const answer = await test.anyone().get('/api/session').expect(200);
    expect(answer.body).toMatchObject({ user: null, permissions: [] });
    await test.anyone().post('/api/session').send({ email: 'x' }).expect(422);
    await test
      .anyone()
      .post('/api/session')
      .set('content-type', 'application/json')
      .send('{"email"')
      .expect(400);
  });

  it('stops the eleventh failed try of an account and leaves other accounts alone', async () => {
    for (let i = 0; i < 10; i++) await signIn(emailOf('admin'), 'wrong').expect(401);
    const refused = await signIn(emailOf('admin'), PASSWORD).expect(429);
    expect(refused.body).toMatchObject({ code: 'too-many-tries' });
    expect(refused.headers['retry-after']).toBeDefined();
    await signIn(emailOf('operator'), PASSWORD).expect(201);
  });

  it('refuses an unsafe request from another site', async () => {
    await test
      .anyone()
      .post('/api/session')
      .set('origin', 'https://elsewhere.example')
      .send({ email: emailOf('lead'), password: PASSWORD })
      .expect(403);
    await test
      .anyone()
      .post('/api/session')
      .set('sec-fetch-site', 'cross-site')
      .send({ email: emailOf('lead'), password: PASSWORD })
      .expect(403);
  });
});

describe('a session', () => {
  it('ends on the server when the person signs out, whoever kept the token', async () => {
    const answer = await signIn(emailOf('scheduler'), PASSWORD).expect(201);
    const cookie = String(answer.headers['set-cookie']).split(';')[0] ?? '';
    await test.anyone().get('/api/plans').set('cookie', cookie).expect(200);
    await test.anyone().delete('/api/session').set('cookie', cookie).expect(204);
    await test.anyone().get('/api/plans').set('cookie', cookie).expect(401);
  });

  it('ends when an administrator disables the account', async () => {
    const lead2 = await signIn(emailOf('lead2'), PASSWORD).expect(201);
    const cookie = String(lead2.headers['set-cookie']).split(';')[0] ?? '';
    // The admin's account is locked by the test above: take a fresh server for it.
    const other = await startTestApp();
    const admin = await other.as('admin');
    const open = await other.as('lead2');
    const { body } = await admin.get(`/api/users/${other.people.lead2.id}`).expect(200);
    await admin
      .patch(`/api/users/${other.people.lead2.id}`)
      .set('if-match', `"${other.people.lead2.id}-v${(body as { version: number }).version}"`)
      .send({ disabled: true })
      .expect(200);
    await open.get('/api/plans').expect(401);
    await other
      .anyone()
      .post('/api/session')
      .send({ email: emailOf('lead2'), password: PASSWORD })
      .expect(401);
    await other.close();
    await test.anyone().get('/api/plans').set('cookie', cookie).expect(200);
  });

  it('ends after its time', async () => {
    const other = await startTestApp();
    const agent = await other.as('lead');
    other.clock.set(NOW + 13 * HOUR_MS);
    await agent.get('/api/plans').expect(401);
    await other.close();
  });

  it('accepts no token of another algorithm, issuer, audience or secret', async () => {
    const sid = '00000000-0000-4000-8000-000000000000';
    const exp = Math.floor(NOW / 1000) + 3600;
    const standard = { issuer: 'skysheaf', audience: 'skysheaf-web' };
    const forged = [
      jwt.sign({ sid, exp }, DEMO_SECRET, { ...standard, algorithm: 'HS512' }),
      jwt.sign({ sid, exp }, DEMO_SECRET, { ...standard, issuer: 'somebody' }),
      jwt.sign({ sid, exp }, DEMO_SECRET, { ...standard, audience: 'else' }),
      jwt.sign({ sid, exp }, 'another secret that is long enough too', standard),
      jwt.sign({ sid, exp }, '', { ...standard, algorithm: 'none' }),
      jwt.sign({ sid, exp }, DEMO_SECRET, standard),
      'no token at all',
    ];
    for (const token of forged)
      await test.anyone().get('/api/plans').set('cookie', `skysheaf=${token}`).expect(401);
  });
});
