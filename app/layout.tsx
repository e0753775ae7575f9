import '@fontsource/jetbrains-mono/latin-400.css';
import '@fontsource/jetbrains-mono/latin-600.css';
import '@fontsource/jetbrains-mono/latin-700.css';
import '@fontsource/jetbrains-mono/latin-ext-400.css';
import '@fontsource/jetbrains-mono/greek-400.css';
import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { dark, light } from '@/diagram/symbols/palette';
import { THEME_COOKIE, readTheme, themeClass } from '@/lib/shared/preferences';

export const metadata: Metadata = {
  title: { default: 'Ohmstead', template: '%s - Ohmstead' },
  description: 'Draw, examine, rehearse and hand over the wiring of a home.',
};

export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: light.desk },
    { media: '(prefers-color-scheme: dark)', color: dark.desk },
  ],
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = readTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html lang="en" className={themeClass(theme)}>
      <body>{children}</body>
    </html>
  );
}
