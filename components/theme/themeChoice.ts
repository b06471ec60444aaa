/** What a person chose: one theme for good, or whatever their system says. */
export type ThemeChoice = 'system' | 'light' | 'dark';

/** The theme on the page. */
export type ThemeName = 'light' | 'dark';

/** Where the choice lies in the browser; `assets/web/boot.js` reads the same key before the first paint. */
export const themeStorageKey = 'dapple.theme';

/** Reads a stored value; anything unknown counts as "follow the system". */
export function parseThemeChoice(stored: string | null): ThemeChoice {
  return stored === 'light' || stored === 'dark' ? stored : 'system';
}

/** Which theme a choice means when the system prefers dark or not. */
export function resolveTheme(choice: ThemeChoice, systemPrefersDark: boolean): ThemeName {
  if (choice === 'system') return systemPrefersDark ? 'dark' : 'light';
  return choice;
}
