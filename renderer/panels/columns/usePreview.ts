import { useEffect, useState } from 'preact/hooks';
import type { EngineClient } from '../../engine/client.ts';
import type { EngineSource, Preview } from '../../engine/protocol.ts';
import { useApp } from '../../state/app.ts';

export type PreviewState =
  | { readonly kind: 'none' }
  | { readonly kind: 'reading' }
  | { readonly kind: 'read'; readonly preview: Preview }
  | { readonly kind: 'refused'; readonly sentence: string };

/** The head of the source's file, read when `wanted` and again when the source changes. */
export function usePreview(wanted: boolean): PreviewState {
  const { engine, files } = useApp();
  const source = files.engineSource.value;
  const [{ state, of }, setKnown] = useState<{ state: PreviewState; of: EngineSource | null }>({
    state: { kind: 'none' },
    of: null,
  });
  useEffect(() => {
    const setState = (state: PreviewState): void => setKnown({ state, of: source });
    if (!wanted || source === null) {
      setState({ kind: 'none' });
      return;
    }
    let stale = false;
    setState({ kind: 'reading' });
    headOf(engine.client, source).then(
      (preview) => {
        if (!stale) setState({ kind: 'read', preview });
      },
      (error: unknown) => {
        if (!stale)
          setState({ kind: 'refused', sentence: error instanceof Error ? error.message : String(error) });
      },
    );
    return () => {
      stale = true;
    };
  }, [wanted, source]);
  // Until another file is looked into, what is known is of the one before.
  return of === source ? state : { kind: wanted ? 'reading' : 'none' };
}

const onTheWay = new WeakMap<EngineSource, Promise<Preview>>();

/** Two parts of the window that look into a file at once share one reading. */
function headOf(client: EngineClient, source: EngineSource): Promise<Preview> {
  const asked = onTheWay.get(source);
  if (asked !== undefined) return asked;
  const reading = client.preview(source).finally(() => onTheWay.delete(source));
  onTheWay.set(source, reading);
  return reading;
}
