import { randomUUID } from 'node:crypto';
import type { Response } from 'supertest';
import { describe, expect, it } from 'vitest';
import { ERRORS } from '#shared/errors.ts';
import { routes } from '#server/routes.ts';
import { testApp } from '#tests/support/test-app.ts';
import { makeScene, type Walker } from './walk/scene.ts';
import { nameOf, send, type WalkedRoute } from './walk/send.ts';
import { WALK, type WalkRequest } from './walk/table.ts';

const app = await testApp();
const scene = await makeScene(app);

const rowOf = (route: WalkedRoute) => {
  const row = WALK[nameOf(route)];
  if (!row) throw new Error(`${nameOf(route)} has no row in tests/api/walk/table.ts`);
  return row;
};

/** Somebody who may: the attack is not on the door. */
const insider = (route: WalkedRoute): Walker =>
  rowOf(route).may.find((walker) => walker !== 'nobody' && walker !== 'registrar') ?? 'registrar';

const attack = async (route: WalkedRoute, change: (request: WalkRequest) => WalkRequest) => {
  const row = rowOf(route);
  const walker = insider(route);
  return send(scene, route, row, walker, change(await row.request(scene, walker)));
};

/** Never a 500; and whatever is refused is refused as a problem document that a person can act on. */
function expectCivil(reply: Response, what: string): void {
  expect(reply.status, `${what}: ${JSON.stringify(reply.body)}`).toBeLessThan(500);
  if (reply.status < 400) return;
  expect(reply.type, what).toBe('application/problem+json');
  const id = String(reply.body.type).replace('/problems/', '') as keyof typeof ERRORS;
  expect(reply.body, what).toMatchObject({
    type: `/problems/${id}`,
    title: ERRORS[id].title,
    status: ERRORS[id].status,
    detail: expect.stringMatching(/\S/),
    instance: expect.stringMatching(/\S/),
  });
  expect(reply.status, what).toBe(ERRORS[id].status);
  expect(JSON.stringify(reply.body), what).not.toMatch(
    /SELECT |INSERT INTO|ER_[A-Z]+|SQLState|node_modules|\.ts:\d/,
  );
  for (const [field, problem] of Object.entries(reply.body.fields ?? {})) {
    expect(problem, `${what}: ${field}`).toMatchObject({ message: expect.stringMatching(/\S/) });
  }
}

/** Values that no field expects, and values that some text fields may take: neither may break the server. */
const ODD_VALUES: unknown[] = [
  null,
  true,
  -1,
  1e300,
  '',
  '   ',
  'a\u0000b',
  "'; DROP TABLE act; --",
  '1e999',
  '99999999999999999999',
  '-0',
  'NaN',
  '\ud800',
  '😀'.repeat(30),
  'x'.repeat(5000),
  [],
  [null],
  {},
  { $gt: '' },
  '2025-02-30',
  '0000-00-00',
  '9999-12-31',
];

type Path = (string | number)[];

/** Every place of a value, the containers included. */
function placesOf(value: unknown, at: Path = []): Path[] {
  if (value === null || typeof value !== 'object') return [at];
  const inside = Object.entries(value).flatMap(([key, member]) =>
    placesOf(member, [...at, Array.isArray(value) ? Number(key) : key]),
  );
  return at.length === 0 ? inside : [at, ...inside];
}

function withValue(root: unknown, [key, ...rest]: Path, value: unknown): unknown {
  if (key === undefined) return value;
  const copy = (Array.isArray(root) ? [...root] : { ...(root as object) }) as Record<
    string | number,
    unknown
  >;
  copy[key] = withValue(copy[key], rest, value);
  return copy;
}

function valueAt(root: unknown, path: Path): unknown {
  return path.reduce<unknown>((value, key) => (value as Record<string | number, unknown>)[key], root);
}

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

describe.each(routes.map((route) => [nameOf(route), route] as const))('%s', (_name, route) => {
  it('answers another method with 404', async () => {
    const { path } = await rowOf(route).request(scene, insider(route));
    const reply = await scene.agent('registrar').patch(path).send({});
    expect(reply.status).toBe(404);
    expectCivil(reply, 'PATCH');
  });

  const parameters = [...route.path.matchAll(/:(\w+)/g)].map((match) => match[1] ?? '');
  const addresses: [string, number[]][] = [
    ['not-an-id', [404]],
    [randomUUID(), [404]],
    [randomUUID().toUpperCase(), [404]],
    ["'%20OR%20'1'='1", [404]],
    ['%00', [404]],
    ['..%2f..%2fetc%2fpasswd', [404]],
    ['%E0%A4%A', [400]],
    ['%F0%9F%98%80', [404]],
    ['x'.repeat(3000), [404]],
  ];
  if (parameters.length > 0) {
    it.each(addresses)('answers an address that names nothing: %s', async (segment, expected) => {
      for (const parameter of parameters) {
        const { path, ...request } = await rowOf(route).request(scene, insider(route));
        const place = route.path.split('/').indexOf(`:${parameter}`);
        const broken = path.split('/').map((part, index) => (index === place ? segment : part));
        const reply = await attack(route, () => ({ ...request, path: broken.join('/') }));
        expectCivil(reply, `${parameter} = ${segment}`);
        expect(expected, `${parameter} = ${segment}: ${JSON.stringify(reply.body)}`).toContain(reply.status);
      }
    });
  }

  it('bears any query', async () => {
    const { query } = await rowOf(route).request(scene, insider(route));
    const asked = route.method === 'get' ? ['day', 'limit', 'cursor', 'sort', 'laboratory', 'q'] : [];
    const names = [...Object.keys(query ?? {}), 'unknown', ...asked];
    for (const name of new Set(names)) {
      for (const value of [
        '',
        'a\u0000b',
        "' OR 1=1 --",
        '-1',
        '1e9',
        '2025-02-30',
        'x'.repeat(4000),
        '😀',
        '%',
      ]) {
        const reply = await attack(route, (request) => ({
          ...request,
          query: { ...request.query, [name]: value },
        }));
        expectCivil(reply, `${name}=${value}`);
        if (reply.status === 400) expect(Object.keys(reply.body.fields ?? {}), name).toContain(name);
      }
      const twice = await attack(route, (request) => ({
        ...request,
        path: `${request.path}?${name}=a&${name}=b&${name}[c]=d`,
      }));
      expectCivil(twice, `${name} twice`);
    }
  });

  if (route.method !== 'get') {
    it('refuses a request that another site could have sent', async () => {
      const row = rowOf(route);
      const walker = insider(route);
      const { path, query, body } = await row.request(scene, walker);
      const agent = await scene.freshAgent(walker);
      const bare = await agent[route.method](path)
        .unset('X-Requested-With')
        .query(query ?? {})
        .send((body ?? {}) as object);
      expect(bare.status).toBe(403);
      expectCivil(bare, 'without header');
      const cross = await agent[route.method](path)
        .set('Sec-Fetch-Site', 'cross-site')
        .query(query ?? {})
        .send((body ?? {}) as object);
      expect(cross.status).toBe(403);
      expect(cross.body.type).toBe('/problems/foreign-origin');
    });
  }
});

const bodied = [];
for (const route of routes) {
  const row = WALK[nameOf(route)];
  if (!row || !route.takesBody) continue;
  const { body } = await row.request(scene, insider(route));
  if (body !== undefined) bodied.push([nameOf(route), route, body] as const);
}

describe.each(bodied)('the body of %s', (_name, route, body) => {
  const raw = async (text: string, type = 'application/json') => {
    const row = rowOf(route);
    const walker = insider(route);
    const { path, query } = await row.request(scene, walker);
    const agent = row.endsSession ? await scene.freshAgent(walker) : scene.agent(walker);
    return agent[route.method](path)
      .query(query ?? {})
      .set('Content-Type', type)
      .send(text);
  };

  it.each([
    ['malformed JSON', '{"a":', 'application/json'],
    ['not JSON', 'a=b', 'application/json'],
    ['a bare string', '"x"', 'application/json'],
    ['null', 'null', 'application/json'],
    ['an array', '[]', 'application/json'],
    ['nothing', '', 'application/json'],
    ['a form', 'email=a&password=b', 'application/x-www-form-urlencoded'],
    ['text', '{}', 'text/plain'],
    ['an unknown charset', '{}', 'application/json; charset=klingon'],
    [
      'prototype games',
      '{"__proto__":{"isRegistrar":true},"constructor":{"prototype":{}}}',
      'application/json',
    ],
    ['deep nesting', `${'['.repeat(20_000)}${']'.repeat(20_000)}`, 'application/json'],
  ])('refuses %s', async (what, text, type) => {
    const reply = await raw(text, type);
    expectCivil(reply, what);
    expect([400, 415]).toContain(reply.status);
  });

  it('refuses more than a megabyte with 413', async () => {
    const reply = await raw(JSON.stringify({ filler: 'x'.repeat(1_100_000) }));
    expect(reply.status).toBe(413);
    expectCivil(reply, 'huge');
  });

  it('names a field that is not known', async () => {
    const reply = await attack(route, (request) => ({
      ...request,
      body: { ...(request.body as object), isRegistrar: true },
    }));
    expect(reply.status).toBe(400);
    expect(reply.body.fields.isRegistrar.message).toMatch(/not known/);
  });

  it('names each required field that is missing', async () => {
    for (const field of Object.keys(body as object)) {
      const { [field]: _left, ...rest } = body as Record<string, unknown>;
      const reply = await attack(route, (request) => ({ ...request, body: rest }));
      expectCivil(reply, `without ${field}`);
      if (reply.status === 400) expect(Object.keys(reply.body.fields).join(), field).toContain(field);
    }
  });

  it.each(placesOf(body).map((place) => [place.join('.'), place] as const))(
    'bears any value in %s, and names the field it refuses',
    async (name, place) => {
      const row = rowOf(route);
      const walker = insider(route);
      let request: WalkRequest | null = null;
      for (const odd of ODD_VALUES) {
        request ??= await row.request(scene, walker);
        const odder: WalkRequest = { ...request, body: withValue(request.body, place, odd) };
        const reply: Response = await send(scene, route, row, walker, odder);
        // What was done cannot be done again: the next value gets a fresh request.
        if (reply.status < 400) request = null;
        const what = `${name} = ${JSON.stringify(odd)?.slice(0, 60)}`;
        expectCivil(reply, what);
        if (reply.status !== 400) continue;
        const named = Object.keys(reply.body.fields ?? {});
        expect(
          named.some((field) => field.startsWith(name)),
          `${what} named ${named.join()}`,
        ).toBe(true);
      }
    },
    60_000,
  );

  const identifiers = placesOf(body).filter((place) => UUID.test(String(valueAt(body, place))));
  if (identifiers.length > 0) {
    it.each(identifiers.map((place) => [place.join('.'), place] as const))(
      'does not take an identifier that names nothing in %s for a failure of its own',
      async (name, place) => {
        const reply = await attack(route, (request) => ({
          ...request,
          body: withValue(request.body, place, randomUUID()),
        }));
        expectCivil(reply, name);
      },
    );
  }
});
