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
  };
}
