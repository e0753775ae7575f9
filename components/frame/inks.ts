import { cores, light } from '@/diagram/symbols/palette';

/** Paper is always drawn in the light palette; on the screen each of its inks is a variable of the theme. */
const variables = new Map([
  ...Object.entries(cores.light).map(([code, ink]) => [ink, `var(--core-${code})`] as const),
  ...Object.entries(light).map(([name, ink]) => [ink, `var(--${name})`] as const),
]);

/** The theme's variable for an ink of the light palette. */
export const themed = (ink: string): string => variables.get(ink) ?? ink;
