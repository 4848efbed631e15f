import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';

export interface SmallDisk {
  readonly folder: string;
  /** Makes it a disk that can only be read. */
  readOnly(): void;
  remove(): void;
}

/** A real disk of 256 kB in memory, where this user may mount one (root on Linux); null elsewhere. */
export function mountSmallDisk(folder: string): SmallDisk | null {
  if (process.platform !== 'linux' || process.getuid?.() !== 0) return null;
  mkdirSync(folder, { recursive: true });
  const run = (program: string, ...args: string[]) =>
    spawnSync(program, args, { stdio: 'ignore' }).status === 0;
  if (!run('mount', '-t', 'tmpfs', '-o', 'size=256k', 'tmpfs', folder)) return null;
  return {
    folder,
    readOnly() {
      if (!run('mount', '-o', 'remount,ro', folder)) throw new Error('the disk could not be made read-only');
    },
    remove() {
      // A program that still has it for its folder keeps it no longer than it lives.
      run('umount', '-l', folder);
    },
  };
}
