import { useEffect, useRef, useState } from 'preact/hooks';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { FilmMoment, PicturePreview } from './benchMessages.ts';
import type { PictureClient } from './pictureClient.ts';

/** Typing and sliding settle before a picture is drawn. */
const SETTLE_MS = 160;

export interface ShownPreview {
  /** The last picture that could be drawn; it stays until the next is there. */
  readonly preview: PicturePreview | null;
  /** Address of its image, for as long as it is shown. */
  readonly url: string | null;
  readonly drawing: boolean;
  /** Why what is chosen now cannot be drawn. */
  readonly trouble: string | null;
}

const NOTHING: ShownPreview = { preview: null, url: null, drawing: false, trouble: null };

/**
 * Keeps a preview of the options up to date, drawn by the worker.
 * @param options null while they cannot be used
 * @param moment the frame of a film to show; null for a picture
 * @param facts changes whenever pictures are made from something else; null while there is nothing to draw from
 */
export function usePicturePreview(
  client: PictureClient,
  options: PictureOptions | null,
  moment: FilmMoment | null,
  facts: unknown,
  room: readonly [number, number] | null,
): ShownPreview {
  const [shown, setShown] = useState<ShownPreview>(NOTHING);
  const url = useRef<string | null>(null);
  const wish = JSON.stringify([options, moment, room]);
  useEffect(() => {
    if (options === null || facts === null || room === null) return;
    let stale = false;
    setShown((before) => ({ ...before, drawing: true }));
    const timer = setTimeout(async () => {
      try {
        const preview = await client.preview(options, moment, room);
        if (stale || preview === null) return;
        if (url.current !== null) URL.revokeObjectURL(url.current);
        url.current = URL.createObjectURL(new Blob([preview.png], { type: 'image/png' }));
        setShown({ preview, url: url.current, drawing: false, trouble: null });
      } catch (error) {
        if (stale) return;
        const trouble = error instanceof Error ? error.message : String(error);
        setShown((before) => ({ ...before, drawing: false, trouble }));
      }
    }, SETTLE_MS);
    return () => {
      stale = true;
      clearTimeout(timer);
      setShown((before) => ({ ...before, drawing: false }));
    };
  }, [client, wish, facts]);
  useEffect(
    () => () => {
      if (url.current !== null) URL.revokeObjectURL(url.current);
    },
    [],
  );
  return shown;
}
