import { computed, effect, type ReadonlySignal, signal } from '@preact/signals';
import { useEffect, useMemo } from 'preact/hooks';
import type { GalaxyRow } from '../engine/protocol.ts';
import { type App, useApp } from '../state/app.ts';

type Row = ReadonlySignal<GalaxyRow | null>;

/** The name of a picked galaxy, once its row has been looked up in the file; null where it has none. */
export function useRowName(row: Row): string | null {
  const app = useApp();
  const { name, stop } = useMemo(() => followRowName(app, row), [app, row]);
  useEffect(() => stop, [stop]);
  return name.value;
}

/** Looks up the name of the row whenever it is another row, or the row of another file; until `stop`. */
export function followRowName({ engine, view }: Pick<App, 'engine' | 'view'>, row: Row) {
  /** The name found last, with the reading of the file that it is of. */
  const named = signal<{ of: unknown; line: number; name: string | null } | null>(null);
  const stop = effect(() => {
    const line = row.value?.line;
    const of = engine.loaded.value;
    const hasNames = of?.mapping.id != null;
    // Not for each galaxy that the pointer passes: a large file takes a moment to be read up to its row.
    if (line === undefined || !hasNames || view.pickedGalaxies.value.length === 0) return;
    if (named.peek()?.line === line && named.peek()?.of === of) return;
    engine.client.name(line).then(
      (name) => (named.value = { of, line, name }),
      () => undefined,
    );
  });
  const name = computed(() => {
    const found = named.value;
    const isIts = found !== null && found.line === row.value?.line && found.of === engine.loaded.value;
    return isIts ? found.name : null;
  });
  return { name, stop };
}
