/** What a person sets for one browser: kept in cookies, so that the first painted page already follows it. */
export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

export const THEME_COOKIE = 'ohmstead-theme';
export const KEYS_COOKIE = 'ohmstead-keys';

/** One year: a preference outlives a session and says nothing about the person. */
const MAX_AGE_S = 365 * 24 * 3600;

export const readTheme = (value: string | undefined): Theme => (value === 'light' || value === 'dark' ? value : 'system');

/** The class of the root element; the system's own choice needs none. */
export const themeClass = (theme: Theme): string => (theme === 'system' ? '' : theme);

/** The text to assign to `document.cookie`. */
export const preferenceCookie = (name: string, value: string): string =>
  `${name}=${encodeURIComponent(value)}; path=/; max-age=${MAX_AGE_S}; samesite=lax`;

/** One value out of `document.cookie`. */
export function cookieValue(cookies: string, name: string): string | undefined {
  const found = cookies.split('; ').find((pair) => pair.startsWith(`${name}=`));
  return found === undefined ? undefined : decodeURIComponent(found.slice(name.length + 1));
}
