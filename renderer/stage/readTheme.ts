import type { ConeTheme } from '../cone/types.ts';

/** The colours of theme.css, for what is drawn rather than laid out. */
export function readTheme(mode: 'light' | 'dark'): ConeTheme {
  const style = getComputedStyle(document.documentElement);
  const colour = (name: string) => style.getPropertyValue(name).trim();
  return {
    mode,
    background: colour('--stage'),
    ink: colour('--text'),
    inkMuted: colour('--text-quiet'),
    line: colour('--line-strong'),
    accent: colour('--accent'),
    fontFamily: getComputedStyle(document.body).fontFamily,
    enlarged: pageEnlarged(),
  };
}

/** A browser's own size of type, for which the rulers of the cone are made. */
const USUAL_TYPE_PX = 16;

/** How much larger the page's type is than usual: theme.css sets it by the size of the window. */
export const pageEnlarged = (): number =>
  Number.parseFloat(getComputedStyle(document.documentElement).fontSize) / USUAL_TYPE_PX;
