import { useRef } from 'preact/hooks';
import { copyText } from '../../ui/clipboard.ts';
import { useBoxSize } from '../../ui/useBoxSize.ts';
import type { FilmMoment } from './benchMessages.ts';
import { MomentField } from './MomentField.tsx';
import type { ShownPreview } from './usePicturePreview.ts';

/** The picture as it will be exported, with its text alternative. */
export function PreviewPane(props: {
  readonly shown: ShownPreview;
  readonly sizeText: string;
  readonly waiting: string | null;
  /** Of the paper that a clear picture is laid on. */
  readonly ground: 'dark' | 'paper';
  /** The frame of a film that is shown; null for a picture. */
  readonly moment: FilmMoment | null;
  readonly onFrame: (frame: number) => void;
  readonly onRoom: (room: readonly [number, number]) => void;
  readonly onCopied: (sentence: string) => void;
}) {
  const { shown, sizeText, waiting, ground, moment, onFrame, onRoom, onCopied } = props;
  const pane = useRef<HTMLDivElement>(null);
  useBoxSize(pane, (widthPx, heightPx) => {
    const px = (css: number): number => Math.max(1, Math.round(css * devicePixelRatio));
    onRoom([px(widthPx), px(heightPx)]);
  });
  const description = shown.preview?.description ?? '';
  const copy = async (): Promise<void> =>
    onCopied(
      (await copyText(description))
        ? 'The text alternative is on the clipboard.'
        : 'The browser did not let the text onto the clipboard: select it and copy it by hand.',
    );
  return (
    <div class="bench-left">
      <div class="bench-pane" ref={pane} data-drawing={shown.drawing}>
        {shown.url === null ? (
          <p class="quiet">{waiting ?? (shown.trouble === null ? 'Drawing…' : 'Nothing to show')}</p>
        ) : (
          <img src={shown.url} alt={description} data-ground={ground} />
        )}
      </div>
      {moment === null ? null : <MomentField moment={moment} onFrame={onFrame} />}
      <p class="bench-facts" role="status">
        {sizeText}
        {shown.drawing ? ' · drawing…' : ''}
        {waiting === null ? '' : ` · ${waiting}`}
      </p>
      <div class="bench-words">
        <label for="bench-alternative">Text alternative</label>
        <button type="button" class="link-button" disabled={description === ''} onClick={() => void copy()}>
          Copy it
        </button>
        <textarea id="bench-alternative" rows={3} readOnly value={description} />
      </div>
    </div>
  );
}
