import type { Preview } from '../../../shared-core/catalogue/preview.ts';
import { useApp } from '../../state/app.ts';
import { Dialog } from '../../ui/Dialog.tsx';
import { countText } from '../../ui/numberText.ts';
import { judgeRows } from './judgeRows.ts';
import { MappingForm } from './MappingForm.tsx';
import { type MappingDraft, roleOf } from './mappingDraft.ts';
import type { PreviewState } from './usePreview.ts';

/** The first rows of the file beside the choice of its columns: what is used is marked, and what cannot be. */
export function PreviewDialog(props: {
  readonly state: PreviewState;
  readonly draft: MappingDraft;
  readonly sentence: string | null;
  readonly onChange: (draft: MappingDraft) => void;
  readonly onClose: () => void;
}) {
  const { state, draft, sentence, onChange, onClose } = props;
  const { engine } = useApp();
  const account = engine.selected.value?.account ?? engine.loaded.value?.account ?? null;
  return (
    <Dialog title="The head of the catalogue" kind="wide" onClose={onClose}>
      {state.kind === 'read' ? (
        <div class="preview">
          <div class="preview-choice">
            <MappingForm
              header={state.preview.header}
              draft={draft}
              sentence={sentence}
              onChange={onChange}
            />
            <p class="preview-counts" role="status">
              {engine.progress.value !== null
                ? 'Reading the whole file…'
                : account === null
                  ? 'Not read yet.'
                  : `${countText(account.kept)} rows kept, ${countText(account.setAside)} set aside.`}
            </p>
          </div>
          <PreviewTable preview={state.preview} draft={draft} />
        </div>
      ) : (
        <p class="quiet">{state.kind === 'refused' ? state.sentence : 'Reading the head of the file…'}</p>
      )}
    </Dialog>
  );
}

function PreviewTable(props: { readonly preview: Preview; readonly draft: MappingDraft }) {
  const { preview, draft } = props;
  const { header, rows, decimals } = preview;
  const judged = judgeRows(rows, header, draft, decimals.mark);
  if (rows.length === 0) return <p class="quiet">The file has a header and no rows.</p>;
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard
    <section class="preview-scroll" tabIndex={0} aria-label="First rows of the file">
      <table class="preview-table">
        <caption class="unseen">First rows of the file as they stand there</caption>
        <thead>
          <tr>
            {header.map((name, i) => {
              const role = roleOf(name, draft);
              return (
                <th key={i} scope="col" class={role === null ? '' : 'mapped'}>
                  {name}
                  {role === null ? null : <span class="role">{role}</span>}
                </th>
              );
            })}
            <th scope="col">use</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, r) => {
            const verdict = judged?.[r];
            return (
              <tr key={r} class={verdict?.reason == null ? '' : 'unusable'}>
                {row.map((cell, i) => (
                  <td
                    key={i}
                    class={[
                      roleOf(header[i] ?? '', draft) === null ? '' : 'mapped',
                      verdict?.blamedCell === i ? 'blamed' : '',
                    ].join(' ')}
                  >
                    {cell}
                  </td>
                ))}
                {Array.from({ length: Math.max(0, header.length - row.length) }, (_, i) => (
                  <td key={`missing${i}`} />
                ))}
                <td class="verdict">
                  {verdict === undefined
                    ? ''
                    : verdict.reason === null
                      ? 'kept'
                      : `set aside: ${verdict.reason}`}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}
