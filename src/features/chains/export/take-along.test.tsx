import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { readQuestion } from '../question.ts';
import { CHAIN_DOCUMENTS } from './documents.ts';
import { TakeAlong } from './take-along.tsx';

const UID = '01a01e2f-2000-7738-adb1-8fcf65fde7c6';

/** The register's answers, and what it was asked. */
function register(answer: () => Response): string[] {
  const asked: string[] = [];
  vi.stubGlobal('fetch', (url: string) => {
    asked.push(url);
    return Promise.resolve(answer());
  });
  URL.createObjectURL = () => 'blob:here';
  URL.revokeObjectURL = () => undefined;
  HTMLAnchorElement.prototype.click = () => undefined;
  return asked;
}

function offer(address: string) {
  render(<TakeAlong valueUid={UID} question={readQuestion(new URLSearchParams(address))} />);
  return userEvent.setup();
}

afterEach(() => vi.unstubAllGlobals());

describe('what can be taken along', () => {
  it('asks for the document of the very question on the screen, and says under which name it was saved', async () => {
    const disposition =
      'attachment; filename="x.pdf"; filename*=UTF-8\'\'PA%200411%20statement%202025-01-01.pdf';
    const asked = register(() => new Response('%PDF', { headers: { 'Content-Disposition': disposition } }));
    const user = offer('day=2025-01-01&known=2026-01-01&verdict=conduct&fold=laboratory&at=somewhere');
    await user.click(screen.getByText('Take along'));
    await user.click(screen.getByRole('button', { name: 'Statement of traceability, PDF' }));
    expect(await screen.findByText('PA 0411 statement 2025-01-01.pdf')).toBeTruthy();
    const url = new URL(asked[0]!, 'http://here');
    expect(url.pathname).toBe(`/api/chains/${UID}/statement.pdf`);
    expect(Object.fromEntries(url.searchParams)).toEqual({
      day: '2025-01-01',
      known: '2026-01-01',
      as: 'certified',
      verdict: 'conduct',
      draw: 'flow',
      effects: 'main',
      fold: 'laboratory',
    });
  });

  it('says what the register refused, and offers the same again', async () => {
    const problem = {
      type: '/problems/unprocessable',
      title: 'This cannot be drawn',
      detail: 'Fold the plates.',
    };
    const asked = register(() => Response.json(problem, { status: 422 }));
    const user = offer('');
    await user.click(screen.getByText('Take along'));
    await user.click(screen.getByRole('button', { name: 'Drawing, SVG' }));
    expect((await screen.findByRole('alert')).textContent).toContain('Fold the plates.');
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    await vi.waitFor(() => expect(asked).toHaveLength(2));
  });

  it('offers each document once', () => {
    expect(new Set(CHAIN_DOCUMENTS.map(({ id }) => id)).size).toBe(CHAIN_DOCUMENTS.length);
    offer('');
    for (const { label } of CHAIN_DOCUMENTS) expect(screen.getByText(label)).toBeTruthy();
  });
});
