import { useLayoutEffect, useRef } from 'preact/hooks';
import type { UnsavedWork } from '../../../shared-core/bridge/messages.ts';
import { useApp } from '../../state/app.ts';
import { Dialog } from '../../ui/Dialog.tsx';
import { timeText } from './timeText.ts';
import { useContents } from './useContents.ts';
import './offered.css';

/** Every piece of unsaved work from before, newest first: taken up or forgotten one by one, or all forgotten. */
export function OfferedDialog({ onClose }: { readonly onClose: () => void }) {
  const { files, questions } = useApp();
  const works = files.offered.value;
  const contents = useContents(works);
  const table = useRef<HTMLTableElement>(null);
  useLayoutEffect(() => {
    // A row that goes takes its buttons along: the list goes on from its top.
    if (document.activeElement === document.body) table.current?.querySelector('button')?.focus();
  }, [works]);

  const takeUp = ({ workId }: UnsavedWork): void => {
    // What is in the way of it is told in a notice, which must not lie behind this dialog.
    onClose();
    void files.takeOffered(workId);
  };
  const forgetAll = async (): Promise<void> => {
    const { key } = await questions.ask({
      title: `Forget ${works.length} pieces of unsaved work?`,
      text: 'They cannot be brought back.',
      field: null,
      answers: [
        { key: 'stay', label: 'Keep them' },
        { key: 'forget', label: 'Forget all', danger: true },
      ],
    });
    if (key === 'forget') for (const { workId } of works) await files.dropOffered(workId);
  };
  return (
    <Dialog title="Work that was not saved" kind="offered" onClose={onClose}>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard */}
      <section class="offered-scroll" tabIndex={0} aria-label="Pieces of work, newest first">
        <table ref={table} class="offered">
          <thead>
            <tr>
              <th scope="col">Study</th>
              <th scope="col">Last kept</th>
              <th scope="col" class="offered-count">
                Shells
              </th>
              <th scope="col">Catalogue</th>
              <th scope="col">
                <span class="unseen">What to do</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {works.map((work) => {
              const { shells, catalogue } = contents.get(work.workId) ?? { shells: '…', catalogue: '…' };
              const named = `“${work.title}” of ${timeText(work.keptMs)}`;
              return (
                <tr key={work.workId}>
                  <th scope="row">{work.title}</th>
                  <td class="offered-when">{timeText(work.keptMs)}</td>
                  <td class="offered-count">{shells}</td>
                  <td class="offered-catalogue" title={catalogue}>
                    {catalogue}
                  </td>
                  <td class="offered-acts">
                    <button
                      type="button"
                      class="button"
                      aria-label={`Take it up: ${named}`}
                      onClick={() => takeUp(work)}
                    >
                      Take it up
                    </button>
                    <button
                      type="button"
                      class="button"
                      aria-label={`Forget: ${named}`}
                      onClick={() => void files.dropOffered(work.workId)}
                    >
                      Forget
                    </button>
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </section>
      <div class="offered-foot">
        <p class="quiet">What is neither taken up nor forgotten is kept for the next start.</p>
        <button type="button" class="button danger-button" onClick={() => void forgetAll()}>
          Forget all
        </button>
      </div>
    </Dialog>
  );
}
