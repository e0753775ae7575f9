'use client';

import { useState } from 'react';
import { setSingleKeysOn, useSingleKeysOn } from '@/components/frame/single-keys';
import { CheckField } from '@/components/ui/field';
import { Segmented } from '@/components/ui/segmented';
import { THEMES, THEME_COOKIE, preferenceCookie, themeClass, type Theme } from '@/lib/shared/preferences';

const words: Record<Theme, string> = { system: 'As the system', light: 'White paper', dark: 'Dark paper' };

/** Paper and keys, for this browser. Print is always on white. */
export function Appearance({ theme: first }: { theme: Theme }) {
  const [theme, setTheme] = useState(first);
  const keysOn = useSingleKeysOn();
  const choose = (next: Theme) => {
    setTheme(next);
    document.cookie = preferenceCookie(THEME_COOKIE, next);
    const root = document.documentElement;
    root.classList.remove('light', 'dark');
    if (themeClass(next)) root.classList.add(themeClass(next));
  };
  return (
    <div className="flex flex-col gap-4">
      <Segmented label="Paper" showLabel value={theme} segments={THEMES.map((value) => ({ value, label: words[value] }))} onChange={choose} />
      <CheckField
        label="Single keys act as shortcuts"
        hint="Letters, digits, / and ? while no field has the focus. Off, they do nothing; keys with Ctrl stay."
        checked={keysOn}
        onChange={(event) => setSingleKeysOn(event.target.checked)}
      />
    </div>
  );
}
