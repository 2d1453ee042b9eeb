import { describe, expect, it } from 'vitest';
import { routes } from '#server/routes.ts';
import { testApp } from '#tests/support/test-app.ts';
import { makeScene, WALKERS, type Walker } from './walk/scene.ts';
import { nameOf, send, type WalkedRoute } from './walk/send.ts';
import { READERS, WALK, type WalkRow } from './walk/table.ts';

const app = await testApp();
const scene = await makeScene(app);

/** What the table says: no sign-in is 401 on all but public routes; then may or may not. */
function expectedStatus(route: WalkedRoute, row: WalkRow, walker: Walker): number {
  if (walker === 'nobody' && !route.isPublic) return 401;
  if (row.may.includes(walker)) return row.ok;
  if (row.otherwise !== 'hidden') return row.otherwise;
  return READERS.includes(walker) ? 403 : 404;
}

describe('the table of the walk', () => {
  it('has a row for every route, and no row without a route', () => {
    expect(Object.keys(WALK).sort()).toEqual(routes.map(nameOf).sort());
  });

  it('lets nobody in but on public routes', () => {
    for (const route of routes) {
      expect([nameOf(route), WALK[nameOf(route)]?.may.includes('nobody')]).toEqual([
        nameOf(route),
        route.isPublic,
      ]);
    }
  });

  it('holds few public routes, by name', () => {
    const open = routes.filter((route) => route.isPublic).map(nameOf);
    expect(open.sort()).toEqual(['GET /api/health', 'GET /api/session', 'POST /api/session']);
  });
});

describe.each(routes.map((route) => [nameOf(route), route] as const))('%s', (name, route) => {
  it.each(WALKERS)('as %s', async (walker) => {
    const row = WALK[name];
    if (!row) throw new Error(`${name} has no row in tests/api/walk/table.ts`);
    const reply = await send(scene, route, row, walker, await row.request(scene, walker));
    const what = reply.status >= 400 ? JSON.stringify(reply.body) : '';
    expect(`${reply.status} ${what}`).toMatch(new RegExp(`^${expectedStatus(route, row, walker)} `));
    if (reply.status >= 400) {
      expect(reply.type).toBe('application/problem+json');
      expect(reply.body).toMatchObject({
        status: reply.status,
        type: expect.stringMatching(/^\/problems\//),
      });
    }
  });
});
