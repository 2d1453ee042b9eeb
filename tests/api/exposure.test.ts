import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { issueValue, makeDownstreamScene, type DownstreamScene } from '#tests/support/downstream-scene.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const scene = await makeDownstreamScene(app);
type Who = keyof DownstreamScene['people'];

/** Home's reference is used on 2024-04-10 for the customer's weight, and once more in autumn. */
const late = await issueValue(app, {
  issuer: scene.home,
  holder: scene.home,
  day: '2024-10-10',
  deviation: '0.000477',
  expandedU: '0.0005',
  leansOn: scene.homes.uid,
});
const ask = async (who: Who, query: Record<string, string>, standardId = scene.homes.standardId) =>
  (await app.signIn(scene.people[who])).get(`/api/exposure/${standardId}`).query(query);
const BOTH = { lastGood: '2024-01-01', firstBad: '2024-12-31' };

describe('GET /api/exposure/:standardId', () => {
  it('is 401 without sign-in', async () => {
    const reply = await app.request.get(`/api/exposure/${scene.homes.standardId}`).query(BOTH);
    expect(reply.status).toBe(401);
  });

  it.each([
    [{}, 'lastGood'],
    [{ lastGood: '2024-01-01' }, 'firstBad'],
    [{ lastGood: '2024-02-01', firstBad: '2024-01-01' }, 'lastGood'],
    [{ ...BOTH, by: 'colour' }, 'by'],
  ])('is 400 for %o', async (query, field) => {
    const reply = await ask('home', query as Record<string, string>);
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields)).toContain(field);
  });

  it('is 404 for the standard of others, and for one that is not there', async () => {
    expect((await ask('another', BOTH)).status).toBe(404);
    expect((await ask('home', BOTH, randomUUID())).status).toBe(404);
  });

  it.each([
    ['before the first use', { lastGood: '2024-03-11', firstBad: '2024-04-09' }, 0],
    ['the day of the first use', { lastGood: '2024-04-10', firstBad: '2024-04-10' }, 2],
    ['between the uses', { lastGood: '2024-04-11', firstBad: '2024-10-09' }, 0],
    ['the second use alone', { lastGood: '2024-04-11', firstBad: '2024-10-10' }, 1],
    ['both', BOTH, 3],
  ])('counts what used it, and all below: %s', async (_, query, count) => {
    const reply = await ask('home', query);
    expect(reply.status, reply.text).toBe(200);
    expect(reply.body.total.count).toBe(count);
  });

  it('opens a group, and tells the weight of a customer’s customer as a warning', async () => {
    const reply = await ask('home', { ...BOTH, group: scene.customer.id });
    expect(reply.body.page.rows).toEqual([
      expect.objectContaining({ view: 'full', uid: scene.customers.uid }),
      expect.objectContaining({ view: 'warning', registryNo: scene.below.registryNo }),
    ]);
    expect(reply.text).not.toContain(scene.below.deviation);
    const own = await ask('home', { ...BOTH, group: scene.home.id });
    expect(own.body.page.rows).toEqual([expect.objectContaining({ uid: late.uid })]);
  });

  it('shows the institute what the incident reaches, without values', async () => {
    const reply = await ask('institute', BOTH);
    expect(reply.body.total).toEqual({ count: 3, warned: 3 });
  });
});
