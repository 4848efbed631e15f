import { type ReadonlySignal, useSignal, useSignalEffect } from '@preact/signals';
import type { GalaxyRow } from '../engine/protocol.ts';
import { useApp } from '../state/app.ts';

/** The name of a picked galaxy, once its row has been looked up in the file; null where it has none. */
export function useRowName(row: ReadonlySignal<GalaxyRow | null>): string | null {
  const { engine, view } = useApp();
  /** The name found last, with the reading of the file that it is of. */
  const named = useSignal<{ of: unknown; line: number; name: string | null } | null>(null);
  useSignalEffect(() => {
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
  const found = named.value;
  const isIts = found !== null && found.line === row.value?.line && found.of === engine.loaded.value;
  return isIts ? found.name : null;
}
