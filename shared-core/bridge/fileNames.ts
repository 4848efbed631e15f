import { Refusal } from '../base/refusal.ts';

export const STUDY_ENDING = '.study.json';

// What Windows forbids; the strictest of the common systems, so that a study can travel between them.
const FORBIDDEN = '/\\:*?"<>|';
const RESERVED = /^(con|prn|aux|nul|(com|lpt)[0-9\u00b9\u00b2\u00b3])$/i;
// Control characters and the marks that turn the writing direction, which can make a name look like another.
const INVISIBLE = /[\p{Cc}\p{Zl}\p{Zp}\u200e\u200f\u202a-\u202e\u2066-\u2069]/u;
const LONE_SURROGATE = /\p{Surrogate}/u;
// File systems allow 255 bytes; a margin is left for the ending and for the name while it is being written.
const LONGEST_BYTES = 180;

/**
 * The file name under which a study is saved, from what a person typed: "deep field" becomes
 * "deep field.study.json"; an ending .study.json or .json that was typed is not doubled.
 *
 * Throws Refusal (use) with the reason when the name could leave its folder, hide itself, or does not exist as a file
 * name on one of the common systems.
 */
export function studyFileName(typed: string): string {
  const bare = typed
    .trim()
    .normalize('NFC')
    .replace(/(\.study)?\.json$/i, '')
    .trimEnd();
  const problem = nameProblem(bare);
  if (problem !== null) throw new Refusal(problem, 'use');
  return bare + STUDY_ENDING;
}

/** True when `name` is a bare file name: no folder in it, not hidden, nothing that a system would read as a path. */
export function isBareFileName(name: string): boolean {
  return nameProblem(name) === null;
}

/** `name` made into a bare file name by replacing what cannot stand in one; for names the program itself suggests. */
export function harmlessFileName(name: string, otherwise: string): string {
  let clean = '';
  for (const letter of name.normalize('NFC')) {
    const unfit = FORBIDDEN.includes(letter) || INVISIBLE.test(letter) || LONE_SURROGATE.test(letter);
    clean += unfit ? '-' : letter;
  }
  clean = clean.replace(/^[.\s]+/, '').replace(/[.\s]+$/, '');
  while (utf8Length(clean) > LONGEST_BYTES) clean = [...clean].slice(0, -1).join('');
  return nameProblem(clean) === null ? clean : otherwise;
}

function nameProblem(name: string): string | null {
  if (name === '') return 'No name came: type a name for the study, such as "deep field".';
  const shown = [...name].slice(0, 40).join('').replace(INVISIBLE, '?');
  if (INVISIBLE.test(name) || LONE_SURROGATE.test(name))
    return `The name "${shown}" holds invisible characters: type it with letters, digits and spaces.`;
  const bad = [...name].find((letter) => FORBIDDEN.includes(letter));
  if (bad !== undefined)
    return `The name "${shown}" holds ${bad}, which a file name cannot: leave out ${[...FORBIDDEN].join(' ')}.`;
  if (name.startsWith('.'))
    return `The name "${shown}" begins with a dot and would be hidden: begin it with a letter or digit.`;
  if (/[.\s]$/.test(name) || /^\s/.test(name))
    return `The name "${shown}" begins or ends with a space or a dot: leave that out.`;
  if (RESERVED.test(name.split('.')[0]!.trim()))
    return `The name "${shown}" is kept for a device on some systems: choose another.`;
  const length = utf8Length(name);
  if (length > LONGEST_BYTES)
    return `The name is ${length} bytes long, at most ${LONGEST_BYTES} fit: shorten it.`;
  return null;
}

function utf8Length(text: string): number {
  let bytes = 0;
  for (const letter of text) {
    const code = letter.codePointAt(0)!;
    bytes += code < 0x80 ? 1 : code < 0x800 ? 2 : code < 0x10000 ? 3 : 4;
  }
  return bytes;
}
