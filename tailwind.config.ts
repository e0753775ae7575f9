import plugin from 'tailwindcss/plugin';
import type { Config } from 'tailwindcss';
import { cores, dark, light, type Palette } from './diagram/symbols/palette';

const variables = (palette: Palette, ground: 'light' | 'dark') =>
  Object.fromEntries([
    ...Object.entries(palette).map(([name, value]) => [`--${name}`, value]),
    ...Object.entries(cores[ground]).map(([code, value]) => [`--core-${code}`, value]),
    ['color-scheme', ground],
  ]);

export default {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      // lap: from here on the margin stands beside the sheet
      // wide: from here on foot and title block stand beside each other
      screens: { wide: '56.25rem', lap: '68.75rem' },
      colors: Object.fromEntries(Object.keys(light).map((name) => [name, `var(--${name})`])),
      fontFamily: { mono: ['"JetBrains Mono"', 'ui-monospace', 'monospace'], sans: ['"JetBrains Mono"', 'ui-monospace', 'monospace'] },
      // A fetch shorter than the first fifth of a second shows nothing.
      keyframes: { opening: { from: { transform: 'scaleX(0)' } } },
      animation: { opening: 'opening 1.2s ease-out 0.2s both' },
      fontSize: { small: ['11px', '16px'], body: ['12px', '16px'], head: ['13px', '16px'], title: ['20px', '24px'] },
    },
  },
  plugins: [
    plugin(({ addBase }) =>
      addBase({
        ':root': variables(light, 'light'),
        ':root.dark': variables(dark, 'dark'),
        '@media (prefers-color-scheme: dark)': { ':root:not(.light)': variables(dark, 'dark') },
        // Print is always the light palette, whatever the screen.
        '@media print': { ':root:root': variables(light, 'light') },
      }),
    ),
  ],
} satisfies Config;
