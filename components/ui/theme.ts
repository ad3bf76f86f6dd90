export type Theme = 'light' | 'dark' | 'system';

/** Read on the server by the root layout, so no script has to run before the first paint. */
export const THEME_COOKIE = 'surdwork-theme';

export function readTheme(cookie: string | undefined): Theme {
  return cookie === 'light' || cookie === 'dark' ? cookie : 'system';
}
