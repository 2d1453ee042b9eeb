import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it } from 'vitest';
import { DecimalField } from './decimal-field.tsx';

function Deviation({ start = '' }: { start?: string }) {
  const [value, setValue] = useState(start);
  return (
    <>
      <DecimalField label="Deviation" unit="mg" hint="From nominal" value={value} onChange={setValue} />
      <output>{value}</output>
      <button onClick={() => setValue('1234.5')}>Restore</button>
    </>
  );
}

const held = (): string | null => screen.getByRole('status').textContent;

describe('DecimalField', () => {
  it('hands on plain decimal text and says how the entry was read', async () => {
    const user = userEvent.setup();
    render(<Deviation />);
    const box = screen.getByLabelText('Deviation');
    await user.type(box, '-0,41218');
    expect(held()).toBe('-0.41218');
    expect(document.getElementById(box.getAttribute('aria-describedby') ?? '')?.textContent).toBe(
      'Read as \u22120.412\u200918\u2009mg',
    );
  });

  it('refuses in place what it cannot read, and keeps it', async () => {
    const user = userEvent.setup();
    render(<Deviation />);
    const box = screen.getByLabelText<HTMLInputElement>('Deviation');
    await user.type(box, '1,234');
    expect(box.getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText(/can be read in two ways/)).toBeTruthy();
    expect(box.value).toBe('1,234');
    expect(held()).toBe('1,234');
  });

  it('shows what the form holds when that is set from outside', async () => {
    const user = userEvent.setup();
    render(<Deviation start="0.000212" />);
    const box = screen.getByLabelText<HTMLInputElement>('Deviation');
    expect(box.value).toBe('0.000\u2009212');
    await user.click(screen.getByText('Restore'));
    expect(box.value).toBe('1\u2009234.5');
  });
});
