import { useState } from 'preact/hooks';
import { useApp } from '../../state/app.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { OfferedDialog } from './OfferedDialog.tsx';
import { timeText } from './timeText.ts';

/** Unsaved work from before, offered back in one notice. Closed, it waits for the next start: nothing is forgotten. */
export function Offered() {
  const { files } = useApp();
  const [looking, setLooking] = useState(false);
  const [later, setLater] = useState(false);
  const works = files.offered.value;
  const [first] = works;
  if (first === undefined || later) return null;
  return (
    <div class="notice notice-offer">
      {works.length === 1 ? (
        <>
          <p>
            Work on “{first.title}” from {timeText(first.keptMs)} was not saved.
          </p>
          <div class="notice-actions">
            <button
              type="button"
              class="button accent-button"
              onClick={() => void files.takeOffered(first.workId)}
            >
              Take it up
            </button>
            <button type="button" class="button" onClick={() => void files.dropOffered(first.workId)}>
              Forget it
            </button>
            <Later onClick={() => setLater(true)} />
          </div>
        </>
      ) : (
        <>
          <p>{works.length} pieces of work from earlier were not saved.</p>
          <div class="notice-actions">
            <button type="button" class="button accent-button" onClick={() => setLooking(true)}>
              Look…
            </button>
            <Later onClick={() => setLater(true)} />
          </div>
        </>
      )}
      {looking ? <OfferedDialog onClose={() => setLooking(false)} /> : null}
    </div>
  );
}

function Later({ onClick }: { readonly onClick: () => void }) {
  return <IconButton icon="close" label="Not now" detail="kept for the next start" onClick={onClick} />;
}
