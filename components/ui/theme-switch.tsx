'use client';

import { useState } from 'react';
import { THEME_COOKIE, type Theme } from './theme';

const NEXT: Record<Theme, Theme> = { system: 'light', light: 'dark', dark: 'system' };
const WORD: Record<Theme, string> = { system: 'as the machine', light: 'light', dark: 'dark' };
const YEAR = 365 * 24 * 3600;

function remember(theme: Theme) {
  if (theme === 'system') {
    delete document.documentElement.dataset.theme;
    document.cookie = `${THEME_COOKIE}=; path=/; max-age=0; samesite=lax`;
  } else {
    document.documentElement.dataset.theme = theme;
    document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=${YEAR}; samesite=lax`;
  }
}

/** Light, dark or as the machine. Kept in a cookie, so the server draws the right one at once. */
export function ThemeSwitch({ initial }: { initial: Theme }) {
  const [theme, setTheme] = useState(initial);
  return (
    <button
      type="button"
      className="min-h-7 text-small text-soft underline-offset-4 hover:text-ink hover:underline"
      onClick={() => {
        setTheme(NEXT[theme]);
        remember(NEXT[theme]);
      }}
    >
      Light or dark: <span className="text-ink">{WORD[theme]}</span>
    </button>
  );
}
