import type { DrawnFormat } from '../../../shared-core/picture/job.ts';
import { memoryText } from '../../../shared-core/picture/memory.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { shellRanges } from '../../../shared-core/report/shellRange.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';

/** Labels have three lines of some thirty letters each. */
const LONG_LABEL = 80;
/** What the person should know before a picture is exported, though nothing hinders it. */
export function pictureRemarks(options: PictureOptions, shells: readonly ShellStatistics[]): string[] {
  const out: string[] = [];
  for (const { text } of options.labels) {
    if (text.length > LONG_LABEL)
      out.push(
        `The label "${text.slice(0, 24)}…" has ${text.length} letters: in the picture it ends with … where three lines are full, in the text alternative it is whole.`,
      );
  }
  if (options.shells) {
    const ranges = shellRanges(shells);
    const empty = ranges.filter((_, i) => shells[i]!.count === 0);
    // A plan has no galaxies, and nobody needs to be told.
    if (empty.length > 0 && empty.length < shells.length)
      out.push(
        `${empty.length === 1 ? 'The shell' : 'The shells'} ${empty.join(', ')} ${empty.length === 1 ? 'holds' : 'hold'} no galaxies and ${empty.length === 1 ? 'is' : 'are'} drawn empty.`,
      );
  }
  return out;
}

/**
 * Why drawing is not begun for want of memory; null when there is enough, or nobody knows.
 * @param what is drawn, as a sentence begins
 * @param deviceGb memory of the machine as the browser tells it (at most 8)
 */
export function memoryTrouble(
  what: string,
  neededBytes: number,
  deviceGb: number | undefined,
): string | null {
  // Half of a machine's memory belongs to what else runs on it.
  if (deviceGb === undefined || neededBytes <= (deviceGb * 1e9) / 2) return null;
  return `${what} needs about ${memoryText(neededBytes)} of memory, and this machine has ${deviceGb} GB in all: cut the catalogue to fewer galaxies, or use a larger machine.`;
}

export const MIME_TYPES: Readonly<Record<DrawnFormat, string>> = {
  png: 'image/png',
  svg: 'image/svg+xml',
  pdf: 'application/pdf',
  webm: 'video/webm',
  mp4: 'video/mp4',
};
