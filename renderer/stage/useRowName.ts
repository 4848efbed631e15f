import { type ReadonlySignal, useSignal, useSignalEffect } from '@preact/signals';
import type { GalaxyRow } from '../engine/protocol.ts';
import { useApp } from '../state/app.ts';

/** The name of a picked galaxy, once its row has been looked up in the file; null where it has none. */
export function useRowName(row: ReadonlySignal<GalaxyRow | null>): string | null {
  const { engine, view } = useApp();
  const named = useSignal<{ readonly line: number; readonly name: string | null } | null>(null);
  useSignalEffect(() => {
    const line = row.value?.line;
    const hasNames = engine.loaded.value?.mapping.id != null;
    // Not for each galaxy that the pointer passes: a large file takes a moment to be read up to its row.
    if (line === undefined || !hasNames || view.pickedGalaxies.value.length === 0) return;
    if (named.peek()?.line === line) return;
    engine.client.name(line).then(
      (name) => (named.value = { line, name }),
      () => undefined,
    );
  });
  return named.value !== null && named.value.line === row.value?.line ? named.value.name : null;
}
