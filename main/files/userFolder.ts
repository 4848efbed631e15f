import { join } from 'node:path';

/** What decides where a user's own files lie; passed in, so that a test on one system covers all of them. */
export interface Machine {
  platform: NodeJS.Platform;
  env: Readonly<Record<string, string | undefined>>;
  homeFolder: string;
}

/**
 * The folder for this program's own files of one user (recent studies, unsaved work, the browser's profile).
 * Linux: XDG Base Directory Specification 0.8 ($XDG_CONFIG_HOME, which must be absolute, else ~/.config);
 * macOS and Windows: their usual places. CONEWRIGHT_HOME, where set, is taken instead.
 */
export function userFolder({ platform, env, homeFolder }: Machine): string {
  const own = env.CONEWRIGHT_HOME;
  if (own) return own;
  if (platform === 'win32') return join(env.APPDATA || join(homeFolder, 'AppData', 'Roaming'), 'Conewright');
  if (platform === 'darwin') return join(homeFolder, 'Library', 'Application Support', 'Conewright');
  const xdg = env.XDG_CONFIG_HOME;
  return join(xdg?.startsWith('/') ? xdg : join(homeFolder, '.config'), 'conewright');
}
