import type { ConeTheme } from './types.ts';

/** The dark stage, until the window says otherwise. */
export const DARK: ConeTheme = {
  mode: 'dark',
  background: '#0d1117',
  ink: '#e6e9ee',
  inkMuted: '#a3abb8',
  line: '#4a5362',
  accent: '#f0b35b',
  fontFamily: 'system-ui, sans-serif',
};
