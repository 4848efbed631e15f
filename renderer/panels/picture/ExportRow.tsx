import { PICTURE_FORMATS, type PictureFormat } from '../../../shared-core/picture/job.ts';
import type { ExportState } from './usePictureExport.ts';

const HINTS: Readonly<Record<PictureFormat, string>> = {
  png: 'Pixels',
  svg: 'Vector text, lines and shells; galaxies as an image',
  pdf: 'One page with vector text, lines and shells; galaxies as an image',
};

/** What hinders an export, the three formats, and how far the one that runs is. */
export function ExportRow(props: {
  readonly state: ExportState;
  /** By format: why it cannot be written; null when it can. */
  readonly hindered: Readonly<Record<PictureFormat, string | null>>;
  readonly remarks: readonly string[];
  readonly said: string | null;
  readonly onExport: (format: PictureFormat) => void;
  readonly onCancel: () => void;
}) {
  const { state, hindered, remarks, said, onExport, onCancel } = props;
  const writing = state.kind === 'writing';
  const hindrances = [...new Set(Object.values(hindered).filter((why) => why !== null))];
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
          <label for="bench-progress">Writing {state.format.toUpperCase()}</label>
          <progress id="bench-progress" max={1} value={state.fraction} />
          <button type="button" class="button" onClick={onCancel}>
            Cancel
          </button>
        </div>
      ) : (
        <div class="bench-formats">
          {PICTURE_FORMATS.map((format) => (
            <button
              key={format}
              type="button"
              class={format === 'png' ? 'button accent-button' : 'button'}
              title={hindered[format] ?? HINTS[format]}
              disabled={hindered[format] !== null}
              onClick={() => onExport(format)}
            >
              Export {format.toUpperCase()}
            </button>
          ))}
        </div>
      )}
    </div>
  );
}
