import { link, open, readdir, realpath, rename, stat, unlink } from 'node:fs/promises';

/** The system calls that saving needs, so that a test can let any one of them fail as a full or broken disk does. */
export interface FileCalls {
  link: typeof link;
  open: typeof open;
  readdir: (folder: string) => Promise<string[]>;
  realpath: (path: string) => Promise<string>;
  rename: typeof rename;
  stat: (path: string) => Promise<{ isFile(): boolean; mode: number; uid: number; gid: number }>;
  unlink: typeof unlink;
}

export const systemCalls: FileCalls = {
  link,
  open,
  readdir: (folder) => readdir(folder),
  realpath: (path) => realpath(path),
  rename,
  stat: (path) => stat(path),
  unlink,
};
