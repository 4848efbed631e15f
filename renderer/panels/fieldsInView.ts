import type { SkyField } from '../../shared-core/sky/fields.ts';
import { fieldIndex } from '../skymap/skyContent.ts';
import type { App } from '../state/app.ts';

/** The fields of the region or of its estimate. */
export function fieldsInView({ engine }: Pick<App, 'engine'>): readonly SkyField[] {
  return engine.footprint.value?.fields ?? [];
}

/** The field that map and cone look at; undefined where there is none. */
export function fieldInView(app: Pick<App, 'engine' | 'view'>): SkyField | undefined {
  const fields = fieldsInView(app);
  return fields[fieldIndex(fields, app.view.field.value)];
}
