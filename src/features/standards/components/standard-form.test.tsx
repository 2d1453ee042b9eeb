import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { StandardForm } from './standard-form.tsx';

const LABORATORY = { value: '019256f8-d100-768f-b25c-537f2ac54de9', label: 'Tarn Valley Standards' };
const network = vi.fn<typeof fetch>();
beforeEach(() => vi.stubGlobal('fetch', network));
afterEach(() => {
  vi.unstubAllGlobals();
  network.mockReset();
});

function show() {
  const registered = vi.fn<(id: string) => void>();
  const shown = render(
    <QueryClientProvider client={new QueryClient()}>
      <StandardForm accountId="a" laboratories={[LABORATORY]} onRegistered={registered} />
    </QueryClientProvider>,
  );
  return { ...shown, registered, user: userEvent.setup() };
}

const input = (name: RegExp | string) => screen.getByLabelText<HTMLInputElement>(name);
const submit = () => screen.getByRole('button', { name: 'Register the weight' });
const sent = () => JSON.parse(String(network.mock.calls[0]?.[1]?.body)) as Record<string, unknown>;

describe('StandardForm', () => {
  it('sends what was typed: grams, nothing for what was left empty, the density with its origin', async () => {
    const { user, registered } = show();
    network.mockResolvedValueOnce(
      new Response(JSON.stringify({ id: LABORATORY.value, registryNo: 'TV 0500' }), { status: 201 }),
    );
    await user.type(input('Registry number'), 'TV 0500');
    await user.type(input('Nominal'), '500 mg');
    await user.selectOptions(screen.getByLabelText(/^Class/), 'E2');
    await user.click(screen.getByRole('button', { name: /Assume stainless steel/ }));
    await user.click(submit());
    await expect.poll(() => registered.mock.calls).toEqual([[LABORATORY.value]]);
    expect(sent()).toMatchObject({
      nominal: '0.5',
      marking: '500 mg',
      shape: 'wire',
      class: 'E2',
      serial: null,
      intervalMonths: null,
      density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
    });
  });

  it('takes no bare number for grams', async () => {
    const { user } = show();
    await user.type(input('Nominal'), '20');
    await user.tab();
    expect(screen.getByText(/such as 1 kg or 500 mg; received "20"/)).toBeTruthy();
    expect(input('Marking').value).toBe('');
  });

  it('keeps a marking that somebody wrote', async () => {
    const { user } = show();
    await user.type(input('Marking'), 'K 91');
    await user.type(input('Nominal'), '1 kg');
    expect(input('Marking').value).toBe('K 91');
  });

  it('shows the error limit of the class and, from 10 kg on, how to lift', async () => {
    const { user } = show();
    await user.selectOptions(screen.getByLabelText(/^Class/), 'F1');
    await user.type(input('Nominal'), '20 kg');
    expect(screen.getByText(/100\u2009mg|100.mg/)).toBeTruthy();
    expect(screen.getByText('10 kg or more: plan the lift')).toBeTruthy();
    await user.clear(input('Nominal'));
    await user.type(input('Nominal'), '3 kg');
    expect(screen.getByText(/sets no error limit for class F1 at 3/)).toBeTruthy();
    expect(screen.queryByText('10 kg or more: plan the lift')).toBeNull();
  });

  it('puts what the server refuses beside its field', async () => {
    const { user, registered } = show();
    const message = 'This registry number already names a standard. Choose another.';
    network.mockResolvedValueOnce(
      new Response(
        JSON.stringify({
          type: '/problems/duplicate',
          title: 'Already in the register',
          status: 409,
          fields: { registryNo: { message, received: 'TV 0112' } },
        }),
        { status: 409 },
      ),
    );
    await user.type(input('Registry number'), 'TV 0112');
    await user.type(input('Nominal'), '1 kg');
    await user.click(submit());
    expect(
      await screen.findByText(/already names a standard. Choose another \(received "TV 0112"\)/),
    ).toBeTruthy();
    expect(document.activeElement).toBe(input('Registry number'));
    expect(registered).not.toHaveBeenCalled();
  });

  it('names what is missing and sends nothing', async () => {
    const { user } = show();
    await user.click(submit());
    expect(await screen.findByText(/Expected a registry number such as TV 0112/)).toBeTruthy();
    expect(input('Nominal').getAttribute('aria-invalid')).toBe('true');
    expect(network).not.toHaveBeenCalled();
  });

  it('fills itself again after the tab was closed', async () => {
    const { user, unmount } = show();
    await user.type(input('Registry number'), 'TV 0777');
    await user.type(input('Nominal'), '2 kg');
    unmount();
    show();
    expect(input('Registry number').value).toBe('TV 0777');
    expect(input('Nominal').value).toBe('2\u2009kg');
    expect(screen.getByText(/Filled again with what you typed/)).toBeTruthy();
  });
});
