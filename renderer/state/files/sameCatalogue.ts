import type { StudySource } from '../../../shared-core/study/schema.ts';

/**
 * Whether two studies stand on one catalogue: the same file by its path, or the same contents. Where a browser keeps
 * the path to itself and a fingerprint is not known yet, two files may share a name: then they count as two.
 */
export function sameCatalogue(a: StudySource | null, b: StudySource | null): boolean {
  if (JSON.stringify(a) === JSON.stringify(b)) return true;
  if (a?.kind !== 'file' || b?.kind !== 'file') return false;
  return (a.path !== null && a.path === b.path) || (a.sha256 !== null && a.sha256 === b.sha256);
}
