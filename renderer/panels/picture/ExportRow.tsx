import type { DrawnFormat } from '../../../shared-core/picture/job.ts';
import type { ExportState } from './usePictureExport.ts';

const HINTS: Readonly<Record<DrawnFormat, string>> = {
  png: 'Pixels',
  svg: 'Vector text, lines and shells; galaxies as an image',
  pdf: 'One page with vector text, lines and shells; galaxies as an image',
  webm: 'VP9, for browsers and free players',
  mp4: 'H.264, for slides and most players',
};

const NAMES: Readonly<Record<DrawnFormat, string>> = {
  png: 'PNG',
  svg: 'SVG',
  pdf: 'PDF',
  webm: 'WebM',
  mp4: 'MP4',
};

/** What hinders an export, the formats, the first of them the usual one, and how far the one that runs is. */
export function ExportRow(props: {
  readonly state: ExportState;
  /** In their order: each format, and why it cannot be written; null when it can. */
  readonly hindered: readonly (readonly [DrawnFormat, string | null])[];
  readonly remarks: readonly string[];
  readonly said: string | null;
  readonly onExport: (format: DrawnFormat) => void;
  readonly onCancel: () => void;
}) {
  const { state, hindered, remarks, said, onExport, onCancel } = props;
  const writing = state.kind === 'writing';
  const hindrances = [...new Set(hindered.map(([, why]) => why).filter((why) => why !== null))];
  return (
    <div class="bench-export">
      <div class="bench-sentences" aria-live="polite">
        {hindrances.map((why) => (
          <p key={why} class="field-trouble">
            {why}
          </p>
        ))}
        {remarks.map((remark) => (
          <p key={remark} class="bench-remark">
            {remark}
          </p>
        ))}
      </div>
      <p class={state.kind === 'ended' && !state.well ? 'field-trouble' : 'bench-said'} role="status">
        {state.kind === 'ended' ? state.sentence : (said ?? '')}
      </p>
      {writing ? (
        <div class="bench-progress">
          <label for="bench-progress">Writing {NAMES[state.format]}</label>
          <progress id="bench-progress" max={1} value={state.fraction} />
          <button type="button" class="button" onClick={onCancel}>
            Cancel
          </button>
        </div>
      ) : (
        <div class="bench-formats">
          {hindered.map(([format, why], i) => (
            <button
              key={format}
              type="button"
              class={i === 0 ? 'button accent-button' : 'button'}
              title={why ?? HINTS[format]}
              disabled={why !== null}
              onClick={() => onExport(format)}
            >
              Export {NAMES[format]}
            </button>
          ))}
        </div>
      )}
    </div>
  );
}
