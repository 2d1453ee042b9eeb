import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { SignInForm } from './sign-in-form.tsx';

const network = vi.fn<typeof fetch>();
beforeEach(() => vi.stubGlobal('fetch', network));
afterEach(() => {
  vi.unstubAllGlobals();
  network.mockReset();
});

function show(): { signedIn: ReturnType<typeof vi.fn>; user: ReturnType<typeof userEvent.setup> } {
  const signedIn = vi.fn<() => void>();
  render(
    <QueryClientProvider client={new QueryClient()}>
      <SignInForm onSignedIn={signedIn} />
    </QueryClientProvider>,
  );
  return { signedIn, user: userEvent.setup() };
}

describe('SignInForm', () => {
  it('names the fields that are missing and sends nothing', async () => {
    const { user } = show();
    await user.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('Type your password')).toBeTruthy();
    expect(screen.getByLabelText('E-mail').getAttribute('aria-invalid')).toBe('true');
    expect(network).not.toHaveBeenCalled();
  });

  it('says why it was refused and keeps what was typed', async () => {
    const { user, signedIn } = show();
    const problem = {
      type: '/problems/sign-in-refused',
      title: 'E-mail or password not accepted',
      status: 401,
    };
    network.mockResolvedValueOnce(new Response(JSON.stringify(problem), { status: 401 }));
    await user.type(screen.getByLabelText('E-mail'), 'someone@lab.example');
    await user.type(screen.getByLabelText('Password'), 'guess{Enter}');
    expect((await screen.findByRole('alert')).textContent).toContain('E-mail or password not accepted');
    expect(screen.getByLabelText<HTMLInputElement>('E-mail').value).toBe('someone@lab.example');
    expect(document.activeElement).toBe(screen.getByLabelText('Password'));
    expect(signedIn).not.toHaveBeenCalled();
  });

  it('goes on once signed in', async () => {
    const { user, signedIn } = show();
    network.mockResolvedValueOnce(new Response(JSON.stringify({ person: null, isDemo: true })));
    await user.type(screen.getByLabelText('E-mail'), 'someone@lab.example');
    await user.type(screen.getByLabelText('Password'), 'the right one{Enter}');
    await expect.poll(() => signedIn.mock.calls.length).toBe(1);
    expect(network.mock.calls[0]?.[1]?.body).toBe(
      '{"email":"someone@lab.example","password":"the right one"}',
    );
  });
});
