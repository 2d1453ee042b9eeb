import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { queryClient } from './query-client.ts';
import { routes } from './router.tsx';

const PERSON = {
  accountId: '0190f0aa-1111-7abc-8000-000000000001',
  name: 'A. Metrologist',
  email: 'a@lab.example',
  roles: [],
};

let person: typeof PERSON | null;

beforeEach(() => {
  vi.stubGlobal('fetch', async (url: string) =>
    url === '/api/session'
      ? new Response(JSON.stringify({ person, isDemo: true }))
      : new Response(JSON.stringify({ type: '/problems/not-found', title: 'Not found', status: 404 }), {
          status: 404,
        }),
  );
});

afterEach(() => {
  vi.unstubAllGlobals();
  queryClient.clear();
});

function open(address: string) {
  const router = createMemoryRouter(routes, { initialEntries: [address] });
  render(
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return router;
}

describe('the frame', () => {
  it('asks to sign in first and remembers where one wanted to go', async () => {
    person = null;
    const router = open('/nowhere?day=2025-03-01');
    await screen.findByLabelText('E-mail', {}, { timeout: 5000 });
    expect(router.state.location.pathname + router.state.location.search).toBe(
      '/sign-in?from=%2Fnowhere%3Fday%3D2025-03-01',
    );
  });

  it('keeps the rail beside an address without a screen', async () => {
    person = PERSON;
    open('/nowhere');
    await screen.findByRole('heading', { name: 'Not found' }, { timeout: 5000 });
    expect(screen.getByRole('link', { name: 'Standards' })).toBeTruthy();
    expect(screen.getByText('A. Metrologist')).toBeTruthy();
  });

  it('keeps the rail beside a screen that failed', async () => {
    person = PERSON;
    open('/desk');
    await screen.findByRole('heading', { name: 'Not found' }, { timeout: 5000 });
    expect(screen.getByRole('link', { name: 'Standards' })).toBeTruthy();
  });

  it('asks to sign in again once the session has ended', async () => {
    person = PERSON;
    const router = open('/nowhere');
    await screen.findByRole('heading', { name: 'Not found' }, { timeout: 5000 });
    person = null;
    await queryClient.invalidateQueries({ queryKey: ['session'] });
    await screen.findByLabelText('E-mail', {}, { timeout: 5000 });
    expect(router.state.location.search).toBe('?from=%2Fnowhere');
  });
});
