import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactElement, type ReactNode } from 'react';
import { useMediaQuery } from '@/components/theme/breakpoints';
import { parseThemeChoice, resolveTheme, themeStorageKey, type ThemeChoice, type ThemeName } from '@/components/theme/themeChoice';
import { beforeDawn, morning } from '@/components/theme/tokens';

interface ThemeState {
  /** What the person chose. */
  choice: ThemeChoice;
  /** What is on the page now. */
  theme: ThemeName;
  setChoice: (choice: ThemeChoice) => void;
}

const ThemeContext = createContext<ThemeState | null>(null);

function readChoice(): ThemeChoice {
  try {
    return parseThemeChoice(window.localStorage.getItem(themeStorageKey));
  } catch {
    return 'system'; // A browser that forbids storage still follows its system.
  }
}

function storeChoice(choice: ThemeChoice): void {
  try {
    if (choice === 'system') window.localStorage.removeItem(themeStorageKey);
    else window.localStorage.setItem(themeStorageKey, choice);
  } catch {
    // The choice then holds until the page is closed.
  }
}

/** Keeps `<html data-theme>` in step with the choice, the system and other tabs. Colours themselves are custom properties on the page. */
export function ThemeProvider({ children }: { children: ReactNode }): ReactElement {
  const [choice, setChoiceState] = useState<ThemeChoice>(readChoice);
  const theme = resolveTheme(choice, useMediaQuery('(prefers-color-scheme: dark)'));

  useEffect(() => {
    document.documentElement.dataset.theme = theme;
    const palette = theme === 'dark' ? beforeDawn : morning;
    document.querySelector('meta[name="theme-color"]')?.setAttribute('content', palette.ground);
  }, [theme]);

  useEffect(() => {
    const fromOtherTab = (event: StorageEvent): void => {
      if (event.key === themeStorageKey) setChoiceState(parseThemeChoice(event.newValue));
    };
    window.addEventListener('storage', fromOtherTab);
    return () => window.removeEventListener('storage', fromOtherTab);
  }, []);

  const setChoice = useCallback((next: ThemeChoice) => {
    storeChoice(next);
    setChoiceState(next);
  }, []);

  const state = useMemo(() => ({ choice, theme, setChoice }), [choice, theme, setChoice]);
  return <ThemeContext value={state}>{children}</ThemeContext>;
}

/**
 * The theme and how to choose another. Styles do not need it: they use `colors`.
 * @throws Error outside `ThemeProvider`
 */
export function useTheme(): ThemeState {
  const state = useContext(ThemeContext);
  if (!state) throw new Error('useTheme needs ThemeProvider above it.');
  return state;
}
