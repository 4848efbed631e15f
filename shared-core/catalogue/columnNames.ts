import { plainName } from './spellings.ts';

const MOST_LISTED = 30;
const LONGEST_LISTED = 40;

/**
 * Where a column stands in the header: the name as it is or, when no name is exactly so, the only one that differs
 * in nothing but case. -1 when there is none.
 */
export function findColumn(header: readonly string[], name: string): number {
  const exact = header.indexOf(name);
  if (exact !== -1) return exact;
  const wanted = name.trim().toLowerCase();
  const alike = header.flatMap((candidate, i) => (candidate.toLowerCase() === wanted ? [i] : []));
  return alike.length === 1 ? alike[0]! : -1;
}

/** The columns of a file, for a sentence: the first thirty by name, long names shortened. */
export function listColumns(header: readonly string[]): string {
  const names = header.slice(0, MOST_LISTED).map(shortened).join(', ');
  const more = header.length - MOST_LISTED;
  return more > 0 ? `${names} and ${more} more` : names;
}

function shortened(name: string): string {
  return name.length > LONGEST_LISTED ? `${name.slice(0, LONGEST_LISTED - 1)}…` : name;
}

/** The column whose name is spelled most like this one, or null when none is near. */
export function nearestColumn(header: readonly string[], name: string): string | null {
  const wanted = plainName(name).slice(0, LONGEST_LISTED);
  let nearest: string | null = null;
  let least = Math.max(1, Math.floor(wanted.length / 3)) + 1;
  for (const candidate of header) {
    const distance = editDistance(wanted, plainName(candidate).slice(0, LONGEST_LISTED));
    if (distance < least) {
      least = distance;
      nearest = candidate;
    }
  }
  return nearest;
}

/** Levenshtein's distance: the fewest insertions, deletions and replacements between two words. */
function editDistance(a: string, b: string): number {
  let above = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const replaced = above[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(replaced, above[j]! + 1, row[j - 1]! + 1));
    }
    above = row;
  }
  return above[b.length]!;
}
