import { randomUUID } from 'node:crypto';
import supertest from 'supertest';
import { describe, expect, it } from 'vitest';
import { readRow } from '#server/db/read.ts';
import { assertMembership, createAccount, setPassword } from '#server/modules/identity/index.ts';
import { adoptPolicy } from '#server/modules/network/index.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

let now = new Date('2026-03-02T09:00:00Z');
const app = await testApp({ now: () => now });

/** A browser that was never here: without this each sign-in would stay in one agent's jar. */
const stranger = () => supertest.agent(app.app.express).set('X-Requested-With', 'exagium');

/** The cookie as the browser sends it back. */
const cookieOf = (reply: supertest.Response) => String(reply.headers['set-cookie']).split(';')[0] ?? '';

const sidOf = (cookies: string | string[] | undefined) =>
  decodeURIComponent(/exagium\.session=s(?:%3A|:)([^.;]+)/.exec(String(cookies))?.[1] ?? '');

describe('GET /api/session', () => {
  it('tells a stranger that nobody is signed in, and sets no cookie', async () => {
    const reply = await stranger().get('/api/session');
    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({ person: null, isDemo: false });
    expect(reply.headers['set-cookie']).toBeUndefined();
  });

  it('names the person, the roles of today and their laboratories', async () => {
    const laboratory = await makeLaboratory(app, 'national institute');
    const person = await makePerson(app, 'metrologist', laboratory.id);
    await assertMembership(app.context(), {
      accountId: person.accountId,
      laboratoryId: laboratory.id,
      role: 'reader',
      state: 'granted',
      validFrom: '2020-01-01',
      validTo: '2026-03-01',
    });
    const agent = await app.signIn(person);
    const reply = await agent.get('/api/session');
    expect(reply.body.person).toEqual({
      accountId: person.accountId,
      name: person.user.name,
      email: person.email,
      roles: [
        {
          role: 'metrologist',
          laboratory: {
            id: laboratory.id,
            code: laboratory.code,
            name: laboratory.name,
            isNationalInstitute: true,
          },
        },
      ],
    });
  });

  it.each(['registrar', 'comparison pilot'] as const)(
    'names the network role %s without laboratory',
    async (role) => {
      const agent = await app.signIn(await makePerson(app, role));
      const reply = await agent.get('/api/session');
      expect(reply.body.person.roles).toEqual([{ role, laboratory: null }]);
    },
  );
});

describe('POST /api/session', () => {
  it.each([
    [{ email: 'nobody@test.example', password: 'wrong' }, 'an unknown e-mail'],
    [{ email: 'the real one', password: 'wrong' }, 'a wrong password'],
  ])('refuses %j (%#) with 401 and says nothing about which was wrong', async (body) => {
    const person = await makePerson(app, 'registrar');
    const email = body.email === 'the real one' ? person.email : body.email;
    const reply = await stranger()
      .post('/api/session')
      .send({ ...body, email });
    expect(reply.status).toBe(401);
    expect(reply.body).toEqual({
      type: '/problems/sign-in-refused',
      title: 'E-mail or password not accepted',
      status: 401,
      detail: 'Check the e-mail and the password, and try again.',
      instance: expect.any(String),
    });
    expect(reply.headers['set-cookie']).toBeUndefined();
  });

  it('refuses an account without password', async () => {
    const email = `${randomUUID()}@test.example`;
    await createAccount(app.context(), { email, name: 'No password' });
    const reply = await stranger().post('/api/session').send({ email, password: 'anything' });
    expect(reply.status).toBe(401);
  });

  it.each([
    [{}, ['email', 'password']],
    [{ email: 'a@b.example' }, ['password']],
    [{ email: 'a@b.example', password: '' }, ['password']],
    [{ email: 7, password: ['x'] }, ['email', 'password']],
    [{ email: 'a@b.example', password: 'x', admin: true }, ['admin']],
  ])('refuses %j with 400 and names the fields', async (body, fields) => {
    const reply = await stranger().post('/api/session').send(body);
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields).sort()).toEqual(fields);
  });

  it('refuses a request without the header of the application', async () => {
    const reply = await stranger()
      .post('/api/session')
      .unset('X-Requested-With')
      .send({ email: 'a@b.c', password: 'x' });
    expect(reply.status).toBe(403);
    expect(reply.body.type).toBe('/problems/foreign-origin');
  });

  it('opens a session with a new id, so that an id planted before is worth nothing', async () => {
    const person = await makePerson(app, 'registrar');
    const first = await stranger().post('/api/session').send(credentials(person));
    expect(first.status).toBe(200);
    const planted = cookieOf(first);
    const second = await stranger().post('/api/session').set('Cookie', planted).send(credentials(person));
    expect(sidOf(second.headers['set-cookie'])).not.toBe('');
    expect(sidOf(second.headers['set-cookie'])).not.toBe(sidOf(planted));
    const withPlanted = await stranger().get('/api/session').set('Cookie', planted);
    expect(withPlanted.body.person).toBeNull();
  });

  it('sets a cookie that scripts cannot read and other sites do not send', async () => {
    const person = await makePerson(app, 'registrar');
    const reply = await stranger().post('/api/session').send(credentials(person));
    expect(String(reply.headers['set-cookie'])).toMatch(/HttpOnly/);
    expect(String(reply.headers['set-cookie'])).toMatch(/SameSite=Lax/);
  });

  it('takes the e-mail in any case, but not with another letter that the collation calls equal', async () => {
    const person = await makePerson(app, 'registrar');
    const upper = await stranger()
      .post('/api/session')
      .send({ ...credentials(person), email: ` ${person.email.toUpperCase()} ` });
    expect(upper.status).toBe(200);
    const accented = await stranger()
      .post('/api/session')
      .send({ ...credentials(person), email: person.email.replace('e', 'é') });
    expect(accented.status).toBe(401);
  });

  it('counts a new password only', async () => {
    const person = await makePerson(app, 'registrar');
    await setPassword(app.context(), { accountId: person.accountId, password: 'another long password' });
    expect((await stranger().post('/api/session').send(credentials(person))).status).toBe(401);
    const reply = await stranger()
      .post('/api/session')
      .send({ ...credentials(person), password: 'another long password' });
    expect(reply.status).toBe(200);
  });

  it('slows down guessing at one e-mail: after ten failures even the right password waits 15 minutes', async () => {
    const person = await makePerson(app, 'registrar');
    for (let attempt = 1; attempt <= 10; attempt += 1) {
      const reply = await stranger()
        .post('/api/session')
        .send({ ...credentials(person), password: 'guess' });
      expect(reply.status).toBe(401);
    }
    const refused = await stranger().post('/api/session').send(credentials(person));
    expect(refused.status).toBe(429);
    expect(refused.body.detail).toMatch(/Try again in 15 min/);
    now = new Date(now.getTime() + 15 * 60 * 1000 + 1);
    expect((await stranger().post('/api/session').send(credentials(person))).status).toBe(200);
  });

  it('counts attempts that come all at once', async () => {
    const person = await makePerson(app, 'registrar');
    const replies = await Promise.all(
      Array.from({ length: 14 }, () =>
        stranger()
          .post('/api/session')
          .send({ ...credentials(person), password: 'guess' }),
      ),
    );
    const statuses = replies.map((reply) => reply.status).sort();
    expect(statuses).toEqual([...Array(10).fill(401), ...Array(4).fill(429)]);
    now = new Date(now.getTime() + 16 * 60 * 1000);
  });

  it('slows down guessing from one address over many e-mails', async () => {
    const person = await makePerson(app, 'registrar');
    let refusals = 0;
    for (let attempt = 1; attempt <= 61; attempt += 1) {
      const reply = await stranger()
        .post('/api/session')
        .send({ email: `guess${attempt}@test.example`, password: 'x' });
      if (reply.status === 429) refusals += 1;
    }
    expect(refusals).toBe(1);
    expect((await stranger().post('/api/session').send(credentials(person))).status).toBe(429);
    now = new Date(now.getTime() + 16 * 60 * 1000);
    expect((await stranger().post('/api/session').send(credentials(person))).status).toBe(200);
  });
});

describe('DELETE /api/session', () => {
  it('answers 401 without sign-in', async () => {
    expect((await stranger().delete('/api/session')).status).toBe(401);
  });

  it('ends the session on the server and clears the cookie', async () => {
    const person = await makePerson(app, 'registrar');
    const signedIn = await stranger().post('/api/session').send(credentials(person));
    const cookie = cookieOf(signedIn);
    const reply = await stranger().delete('/api/session').set('Cookie', cookie);
    expect(reply.status).toBe(200);
    expect(reply.body).toEqual({ signedOut: true });
    expect(String(reply.headers['set-cookie'])).toMatch(/exagium\.session=;.*Expires=Thu, 01 Jan 1970/);
    expect(
      await readRow(app.database, 'SELECT sid FROM session WHERE sid = :sid', { sid: sidOf(cookie) }),
    ).toBeNull();
    expect((await stranger().get('/api/session').set('Cookie', cookie)).body.person).toBeNull();
    expect((await stranger().delete('/api/session').set('Cookie', cookie)).status).toBe(401);
  });
});

describe('the demo network', () => {
  // Last, since nothing is ever taken out of the register again.
  it('is told apart by its policy', async () => {
    expect((await stranger().get('/api/session')).body.isDemo).toBe(false);
    await adoptPolicy(app.context(), {
      name: 'demo network',
      edition: '1',
      content: {},
      validFrom: '2015-01-01',
      validTo: null,
    });
    expect((await stranger().get('/api/session')).body.isDemo).toBe(true);
  });
});

function credentials({ email, password }: { email: string; password: string }) {
  return { email, password };
}
