import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { placedQuery } from '../api.ts';
import { PlacedList } from './placed-list.tsx';

const UID = '0184d1d9-7400-77ee-9fca-e053df3e1fc1';

function show(client: QueryClient) {
  render(
    <QueryClientProvider client={client}>
      <PlacedList placed={[{ uid: UID, sign: 1 }]} together={undefined} isAlone onPlaced={() => undefined} />
    </QueryClientProvider>,
  );
}

afterEach(() => vi.unstubAllGlobals());

it('names the one weight on the pan with its certificate', () => {
  const client = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity } } });
  client.setQueryData([...placedQuery(UID).queryKey], {
    type: 'value',
    uid: UID,
    registryNo: 'AB 0001',
    nominal: '100',
    certificateNo: 'AB-24-001',
  });
  show(client);
  expect(screen.getByText('AB 0001')).toBeTruthy();
  expect(screen.getByText('certificate AB-24-001')).toBeTruthy();
  expect(screen.getByRole('button', { name: 'Take off AB 0001' })).toBeTruthy();
});

it('says of an address that leads nowhere that it cannot be opened', async () => {
  const problem = { type: 'not-found', title: 'Not found', status: 404 };
  vi.stubGlobal('fetch', () =>
    Promise.resolve(
      new Response(JSON.stringify(problem), {
        status: 404,
        headers: { 'Content-Type': 'application/problem+json' },
      }),
    ),
  );
  show(new QueryClient());
  expect(await screen.findByText(/Cannot be opened/)).toBeTruthy();
});
