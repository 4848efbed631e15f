import type { SkyField } from '../../shared-core/sky/fields.ts';
import type { App } from '../state/app.ts';

/** The fields of the region or of its estimate. */
export function fieldsInView({ engine }: App): readonly SkyField[] {
  return engine.footprint.value?.fields ?? [];
}
