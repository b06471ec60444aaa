import { act, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { confirm, ConfirmHost } from '@/components/ui/confirm';
import { Dialog } from '@/components/ui/Dialog';

function Page(): ReactElement {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button label="Open" onPress={() => setOpen(true)} />
      <Button label="Elsewhere" />
      <Dialog open={open} onClose={() => setOpen(false)} title="Ten more minutes" actions={<Button label="Add ten minutes" onPress={() => setOpen(false)} />}>
        <p>The next set then starts at 6:46.</p>
      </Dialog>
    </>
  );
}

test('it is named by its title, takes the focus and gives it back', async () => {
  render(<Page />);
  const opener = screen.getByRole('button', { name: 'Open' });
  await userEvent.click(opener);
  const dialog = screen.getByRole('dialog', { name: 'Ten more minutes' });
  expect(dialog.contains(document.activeElement)).toBe(true);
  await userEvent.click(screen.getByRole('button', { name: 'Add ten minutes' }));
  expect(screen.queryByRole('dialog')).toBeNull();
  expect(document.activeElement).toBe(opener);
});

test('Tab and Shift+Tab go round inside it', async () => {
  render(<Page />);
  await userEvent.click(screen.getByRole('button', { name: 'Open' }));
  const names: string[] = [];
  for (let press = 0; press < 3; press += 1) {
    await userEvent.tab();
    names.push(document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.textContent ?? '');
  }
  expect(names).toEqual(['Close', 'Add ten minutes', 'Close']);
  await userEvent.tab({ shift: true });
  expect(document.activeElement?.textContent).toBe('Add ten minutes');
});

test('Escape closes it', async () => {
  render(<Page />);
  await userEvent.click(screen.getByRole('button', { name: 'Open' }));
  await userEvent.keyboard('{Escape}');
  expect(screen.queryByRole('dialog')).toBeNull();
  expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Open' }));
});

describe('confirm', () => {
  const question = { title: 'Remove the zone?', body: 'Its tests go with it.', confirmLabel: 'Remove the zone', tone: 'danger' as const };

  test.each([['Remove the zone', true], ['Keep it as it is', false]])('%s answers %s', async (label, expected) => {
    render(<ConfirmHost />);
    let answer: Promise<boolean> = Promise.resolve(!expected);
    act(() => { answer = confirm(question); });
    expect(screen.getByRole('alertdialog', { name: 'Remove the zone?' })).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: label }));
    await expect(answer).resolves.toBe(expected);
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
  });

  test('Escape means no', async () => {
    render(<ConfirmHost />);
    let answer: Promise<boolean> = Promise.resolve(true);
    act(() => { answer = confirm(question); });
    await userEvent.keyboard('{Escape}');
    await expect(answer).resolves.toBe(false);
  });
});
