import type { SkyField } from '../../shared-core/sky/fields.ts';
import type { App } from '../state/app.ts';
import { regionFields } from './regionReady.ts';

/** The fields of the region or of its estimate; also those of a plan, which the engine knows nothing of. */
export function fieldsInView({ engine, studyState }: App): readonly SkyField[] {
  const { footprint } = engine.selected.value ?? {};
  if (footprint != null) return footprint.fields;
  const { region } = studyState.study.value;
  return region === null ? [] : regionFields(region);
}
