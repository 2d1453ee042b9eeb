import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { address, get, post } from './api-client.ts';
import { ApiProblem, problemLine } from './api-problem.ts';

const Weight = z.object({ id: z.string() });
const network = vi.fn<typeof fetch>();

beforeEach(() => vi.stubGlobal('fetch', network));
afterEach(() => {
  vi.unstubAllGlobals();
  network.mockReset();
});

const answer = (status: number, body: unknown): void => {
  network.mockResolvedValueOnce(new Response(JSON.stringify(body), { status }));
};

async function problemOf(request: Promise<unknown>): Promise<ApiProblem> {
  const error = await request.then(
    () => null,
    (caught: unknown) => caught,
  );
  expect(error).toBeInstanceOf(ApiProblem);
  return error as ApiProblem;
}

describe('api client', () => {
  it('marks unsafe requests as its own and every request with an id', async () => {
    answer(201, { id: 'w' });
    await post('/api/standards', { marking: '1' }, Weight);
    const [url, init] = network.mock.calls[0] ?? [];
    const headers = new Headers(init?.headers);
    expect(url).toBe('/api/standards');
    expect(headers.get('X-Requested-With')).toBe('exagium');
    expect(headers.get('X-Request-Id')).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-7/);
    expect(init).toMatchObject({ method: 'POST', credentials: 'same-origin', body: '{"marking":"1"}' });
  });

  it('throws the problem document of a refusal', async () => {
    const fields = { 'lines.0.k': { message: 'Too small', received: '0', expected: '1 to 20' } };
    answer(422, { type: '/problems/unprocessable', title: 'Not possible as it stands', status: 422, fields });
    const problem = await problemOf(get('/api/x', Weight));
    expect(problem).toMatchObject({ id: 'unprocessable', status: 422, fields });
  });

  it('refuses an answer that is not what was agreed', async () => {
    answer(200, { id: 7 });
    expect((await problemOf(get('/api/x', Weight))).id).toBe('unexpected-answer');
  });

  it('names a failure that came without a document', async () => {
    network.mockResolvedValueOnce(new Response('<h1>Bad gateway</h1>', { status: 502 }));
    expect(await problemOf(get('/api/x', Weight))).toMatchObject({ id: 'internal', status: 502 });
  });

  it('says that nothing was saved when no answer comes', async () => {
    network.mockRejectedValueOnce(new TypeError('failed'));
    const problem = await problemOf(get('/api/x', Weight));
    expect(problem).toMatchObject({ id: 'unreachable', status: 0 });
    answer(200, { id: 'w' });
    await expect(get('/api/x', Weight)).resolves.toEqual({ id: 'w' });
  });

  it('leaves empty parameters out of an address', () => {
    expect(address('/api/standards', { q: '', class: 'E2', day: null, limit: 50 })).toBe(
      '/api/standards?class=E2&limit=50',
    );
  });
});

describe('problemLine', () => {
  it('says what is wrong, what came, what is wanted and where that is laid down', () => {
    expect(
      problemLine({ message: 'Out of range.', received: '25', expected: '1 to 20', clause: 'JCGM 100, 7.2' }),
    ).toBe('Out of range (received "25", expected 1 to 20); JCGM 100, 7.2.');
  });
});
