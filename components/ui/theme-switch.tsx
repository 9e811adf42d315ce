'use client';

import { useState } from 'react';

export type Theme = 'system' | 'light' | 'dark';
const NEXT: Record<Theme, Theme> = { system: 'dark', dark: 'light', light: 'system' };
const WORDS: Record<Theme, string> = { system: 'Light/dark', dark: 'Dark', light: 'Light' };

/** Light, dark, or as the system has it; kept in a cookie so that the first paint is right. */
export function ThemeSwitch({ initial }: { initial: Theme }) {
  const [theme, setTheme] = useState(initial);
  const change = () => {
    const next = NEXT[theme];
    setTheme(next);
    if (next === 'system') delete document.documentElement.dataset.theme;
    else document.documentElement.dataset.theme = next;
    document.cookie = `theme=${next}; path=/; max-age=31536000; samesite=lax`;
  };
  return (
    <button type="button" onClick={change} className="text-soft hover:text-ink" aria-label={`${WORDS[theme]}${theme === 'system' ? ', as the system' : ''}. Change`}>
      {WORDS[theme]}
    </button>
  );
}
