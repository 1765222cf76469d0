'use client';
import { useState } from 'react';

export type Theme = 'device' | 'light' | 'dark';
const NAMES: Record<Theme, string> = { device: 'As the device', light: 'Light', dark: 'Dark' };

/** Light, dark, or as the device says; kept in a cookie so that the server paints it right the first time. */
export function ThemeSwitch({ initial }: { initial: Theme }) {
  const [theme, setTheme] = useState<Theme>(initial);
  const choose = (next: Theme) => {
    setTheme(next);
    if (next === 'device') delete document.documentElement.dataset['theme'];
    else document.documentElement.dataset['theme'] = next;
    document.cookie = `theme=${next}; path=/; max-age=31536000; samesite=lax`;
  };
  return (
    <label className="flex items-center gap-2 text-sm">
      <span className="text-ink-2">Light on this screen</span>
      <select
        value={theme}
        onChange={(event) => choose(event.target.value as Theme)}
        className="min-h-touch rounded-md border border-rule-strong bg-sheet px-2"
      >
        {(Object.keys(NAMES) as Theme[]).map((key) => (
          <option key={key} value={key}>
            {NAMES[key]}
          </option>
        ))}
      </select>
    </label>
  );
}
