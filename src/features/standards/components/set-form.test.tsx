import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { SetForm } from './set-form.tsx';

const LABORATORY = { value: '019256f8-d100-768f-b25c-537f2ac54de9', label: 'Tarn Valley Standards' };
const network = vi.fn<typeof fetch>();
beforeEach(() => vi.stubGlobal('fetch', network));
afterEach(() => {
  vi.unstubAllGlobals();
  network.mockReset();
});

function show() {
  const registered = vi.fn<(registryNo: string) => void>();
  render(
    <QueryClientProvider client={new QueryClient()}>
      <SetForm accountId="a" laboratories={[LABORATORY]} onRegistered={registered} />
    </QueryClientProvider>,
  );
  return { registered, user: userEvent.setup() };
}

const input = (name: RegExp | string) => screen.getByLabelText<HTMLInputElement>(name);
const submit = (count: number) => screen.getByRole('button', { name: `Register ${count} weights` });
/** As one paste: each keystroke would draw the whole table in jsdom. */
async function enter(
  user: ReturnType<typeof userEvent.setup>,
  field: HTMLInputElement,
  text: string,
): Promise<void> {
  await user.clear(field);
  await user.click(field);
  await user.paste(text);
}

/** A short series, so that the table is quick to draw. */
async function chooseShort(user: ReturnType<typeof userEvent.setup>): Promise<void> {
  await user.selectOptions(input('Series'), '1 g to 500 g');
}

describe('SetForm', () => {
  it('registers a filled-in series with a number, a class and one click for the density', async () => {
    const { user, registered } = show();
    network.mockResolvedValueOnce(
      new Response(JSON.stringify({ id: LABORATORY.value, registryNo: 'TV 0300', members: [] }), {
        status: 201,
      }),
    );
    await enter(user, input('Registry number'), 'TV 0300');
    await user.selectOptions(screen.getByLabelText(/^Class/), 'E2');
    expect(input('Name').value).toBe('E2 set, 1 mg to 1 kg');
    await user.click(screen.getByRole('button', { name: /Assume stainless steel/ }));
    await user.click(submit(25));
    await expect.poll(() => registered.mock.calls).toEqual([['TV 0300']]);
    const body = JSON.parse(String(network.mock.calls[0]?.[1]?.body)) as { members: { marking: string }[] };
    expect(body.members).toHaveLength(25);
    expect(body.members[3]).toEqual({
      nominal: '200',
      marking: '200 g*',
      serial: null,
      shape: 'knob',
      material: 'stainless steel',
      class: 'E2',
      density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
    });
    expect(body.members[24]).toMatchObject({ nominal: '0.001', shape: 'wire' });
  }, 20_000);

  it('names the row that is in the way', async () => {
    const { user } = show();
    await chooseShort(user);
    await enter(user, input('Registry number'), 'TV 0300');
    await enter(user, input('Marking of TV 0300-03'), '200 g');
    await user.click(submit(12));
    const notice = (await screen.findByText('1 to mend in the table of weights')).closest('[role=alert]');
    expect(
      within(notice as HTMLElement).getByText(/^Row 3, 200.g, marking: Same nominal and marking as row 2/),
    ).toBeTruthy();
    expect(network).not.toHaveBeenCalled();
  }, 20_000);

  it('asks before it fills the table over rows changed by hand', async () => {
    const { user } = show();
    await chooseShort(user);
    await enter(user, input('Serial of set-01'), '77');
    await user.selectOptions(input('Series'), '1 mg to 500 mg');
    await user.click(screen.getByRole('button', { name: 'Keep what is typed' }));
    expect(input('Serial of set-01').value).toBe('77');
    await user.selectOptions(input('Series'), '1 mg to 100 g');
    await user.click(screen.getByRole('button', { name: 'Replace the rows' }));
    expect(submit(21)).toBeTruthy();
    expect(input('Serial of set-01').value).toBe('');
  }, 20_000);

  it('moves within a column by arrow keys and Enter, and takes rows of a spreadsheet', async () => {
    const { user } = show();
    await chooseShort(user);
    await user.click(input('Marking of set-02'));
    await user.keyboard('{ArrowDown}{Enter}');
    expect(document.activeElement).toBe(input('Marking of set-04'));
    await user.keyboard('{ArrowUp}');
    await user.click(input('Nominal of set-12'));
    await user.paste('1 g\t1 g A\n500 mg\n');
    expect(input('Marking of set-12').value).toBe('1 g A');
    expect(input('Marking of set-13').value).toBe('500 mg');
    expect(input('Shape of set-13').value).toBe('wire');
  }, 20_000);
});
