import { useEffect, useRef, useState } from 'preact/hooks';
import { Cancelled } from '../../../shared-core/base/cancelled.ts';
import type { FilmOptions } from '../../../shared-core/picture/film.ts';
import type { DrawnFormat } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { App } from '../../state/app.ts';
import type { PictureClient } from './pictureClient.ts';
import { MIME_TYPES } from './pictureRemarks.ts';

export type ExportState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'writing'; readonly format: DrawnFormat; readonly fraction: number }
  | { readonly kind: 'ended'; readonly sentence: string; readonly well: boolean };

/**
 * Writes pictures to files, one at a time. What came of it is said on the bench, which lies over the window's own
 * sentences; an export that ends with the bench is told in the window.
 */
export function usePictureExport(app: App, client: PictureClient) {
  const [state, setState] = useState<ExportState>({ kind: 'idle' });
  const running = useRef<AbortController | null>(null);
  const open = useRef(true);
  useEffect(
    () => () => {
      open.current = false;
      running.current?.abort();
    },
    [],
  );
  const end = (sentence: string, well: boolean): void => {
    running.current = null;
    if (open.current) setState({ kind: 'ended', sentence, well });
    else app.notices.tell(sentence, { tone: well ? 'fact' : 'problem' });
  };
  const start = async (
    format: DrawnFormat,
    options: PictureOptions,
    film: FilmOptions | null,
  ): Promise<void> => {
    if (running.current !== null) return;
    const controller = new AbortController();
    running.current = controller;
    setState({ kind: 'writing', format, fraction: 0 });
    const name = `${app.studyState.study.peek().name} ${film?.kind ?? options.view}.${format}`;
    try {
      const done = await app.bridge.exportFile(
        name,
        MIME_TYPES[format],
        client.pieces(format, options, film, {
          signal: controller.signal,
          onProgress: (fraction) => {
            if (open.current) setState({ kind: 'writing', format, fraction });
          },
        }),
      );
      if (done === null) end('No file was chosen, so nothing was written.', true);
      else end(`${done.name} was written to ${done.folder ?? "the browser's downloads"}.`, true);
    } catch (error) {
      if (error instanceof Cancelled) end('The export was cancelled; no file was written.', true);
      else end(error instanceof Error ? error.message : String(error), false);
    }
  };
  return { state, start, cancel: () => running.current?.abort() };
}
