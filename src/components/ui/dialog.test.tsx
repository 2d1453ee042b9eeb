import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it } from 'vitest';
import { SideSheet } from './dialog.tsx';

function Opener() {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <button onClick={() => setOpen(true)}>Open</button>
      {isOpen && (
        <SideSheet title="W 1" onClose={() => setOpen(false)}>
          <button>Inside</button>
        </SideSheet>
      )}
    </>
  );
}

describe('SideSheet', () => {
  it('is named by its title and gives the focus back when it closes', async () => {
    const user = userEvent.setup();
    render(<Opener />);
    await user.click(screen.getByText('Open'));
    expect(screen.getByRole('dialog', { name: 'W 1' })).toBeTruthy();
    screen.getByText('Inside').focus();
    await user.click(screen.getByText('Close'));
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(document.activeElement?.textContent).toBe('Open');
  });

  it('leaves it to its owner to close on Escape', async () => {
    const user = userEvent.setup();
    render(<Opener />);
    await user.click(screen.getByText('Open'));
    const cancel = new Event('cancel', { cancelable: true });
    screen.getByRole('dialog').dispatchEvent(cancel);
    expect(cancel.defaultPrevented).toBe(true);
    await expect.poll(() => screen.queryByRole('dialog')).toBeNull();
  });
});
