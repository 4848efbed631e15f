const LONGEST_TEXT = 200;

/** Cell text fit to be kept: white space at its ends taken off, its first 200 characters. */
export function keptText(text: string): string {
  const trimmed = text.trim();
  const short = trimmed.length > LONGEST_TEXT ? `${trimmed.slice(0, LONGEST_TEXT)}…` : trimmed;
  // A part of a string keeps the whole of it alive, here a block of the file. Joined and cut again it stands alone.
  return ` ${short}`.slice(1);
}
