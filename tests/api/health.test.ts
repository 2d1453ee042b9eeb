import { expect, it } from 'vitest';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

it('answers 200 with status, version and database, without sign-in', async () => {
  const reply = await app.request.get('/api/health');
  expect(reply.status).toBe(200);
  expect(reply.body).toEqual({
    status: 'ready',
    version: expect.stringMatching(/^\d+\.\d+\.\d+$/),
    database: expect.stringContaining('MariaDB'),
  });
});

it('answers an unknown address with problem details', async () => {
  const reply = await app.request.get('/api/nothing-here');
  expect(reply.status).toBe(404);
  expect(reply.type).toBe('application/problem+json');
  expect(reply.body).toMatchObject({ type: '/problems/not-found', status: 404 });
});
