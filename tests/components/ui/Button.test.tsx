import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { Button } from '@/components/ui/Button';

test('a button is a real button that does not send a form by itself', async () => {
  const pressed = jest.fn();
  render(<Button label="Hose moved" onPress={pressed} />);
  const button = screen.getByRole<HTMLButtonElement>('button', { name: 'Hose moved' });
  expect(button.tagName).toBe('BUTTON');
  expect(button.type).toBe('button');
  await userEvent.click(button);
  expect(pressed).toHaveBeenCalledTimes(1);
});

test('while pending it says so, keeps the focus and ignores presses', async () => {
  const pressed = jest.fn();
  const { rerender } = render(<Button label="Hose moved" onPress={pressed} />);
  const button = screen.getByRole<HTMLButtonElement>('button', { name: 'Hose moved' });
  button.focus();
  rerender(<Button label="Hose moved" onPress={pressed} pending />);
  expect(document.activeElement).toBe(button);
  expect(button.getAttribute('aria-busy')).toBe('true');
  expect(button.getAttribute('aria-disabled')).toBe('true');
  expect(screen.getByRole('status').textContent).toBe('Working');
  await userEvent.click(button);
  await userEvent.keyboard('{Enter}');
  expect(pressed).not.toHaveBeenCalled();
});

test('a disabled button cannot be pressed', async () => {
  const pressed = jest.fn();
  render(<Button label="Hose moved" onPress={pressed} disabled />);
  await userEvent.click(screen.getByRole('button'));
  expect(pressed).not.toHaveBeenCalled();
});
