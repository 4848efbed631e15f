import { useComputed } from '@preact/signals';
import type { Study } from '../../shared-core/study/schema.ts';
import { useApp } from '../state/app.ts';

/**
 * A part of the study. What shows only a part is drawn again only when that part changes: an edge that is dragged
 * leaves the rest of the panels alone.
 */
export function useStudyPart<K extends keyof Study>(key: K): Study[K] {
  const { study } = useApp().studyState;
  return useComputed(() => study.value[key]).value;
}
