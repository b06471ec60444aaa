import fs from 'node:fs';
import path from 'node:path';
import { act, render, screen } from '@testing-library/react';
import { ThemeProvider, useTheme } from '@/components/theme/ThemeProvider';
import { parseThemeChoice, resolveTheme } from '@/components/theme/themeChoice';

const boot = fs.readFileSync(path.join(__dirname, '../../../assets/web/boot.js'), 'utf8');

function systemPrefers(dark: boolean): void {
  window.matchMedia = (query: string) => ({
    matches: dark && query.includes('dark'), media: query, onchange: null,
    addEventListener: () => undefined, removeEventListener: () => undefined, addListener: () => undefined, removeListener: () => undefined, dispatchEvent: () => true,
  });
}

function Chooser() {
  const { choice, theme, setChoice } = useTheme();
  return <button onClick={() => setChoice('dark')}>{`${choice} shows ${theme}`}</button>;
}

beforeEach(() => {
  window.localStorage.clear();
  delete document.documentElement.dataset.theme;
});

test.each([
  ['light', true, 'light'], ['dark', false, 'dark'], [null, true, 'dark'], [null, false, 'light'], ['purple', true, 'dark'],
] as const)('stored %s with a system that prefers dark = %s means %s, before and after the first paint', (stored, prefersDark, expected) => {
  expect(resolveTheme(parseThemeChoice(stored), prefersDark)).toBe(expected);
  systemPrefers(prefersDark);
  if (stored !== null) window.localStorage.setItem('dapple.theme', stored);
  new Function(boot)();
  expect(document.documentElement.dataset.theme).toBe(expected);
});

test('a choice is put on the page and kept', () => {
  systemPrefers(false);
  render(<ThemeProvider><Chooser /></ThemeProvider>);
  expect(document.documentElement.dataset.theme).toBe('light');
  act(() => screen.getByRole('button', { name: 'system shows light' }).click());
  expect(screen.getByRole('button', { name: 'dark shows dark' })).toBeTruthy();
  expect(document.documentElement.dataset.theme).toBe('dark');
  expect(window.localStorage.getItem('dapple.theme')).toBe('dark');
});
