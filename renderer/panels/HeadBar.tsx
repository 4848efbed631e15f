import { PUBLISHED_SETS } from '../../shared-core/cosmology/publishedSets.ts';
import { changeLook } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { revealSection } from '../ui/openSections.ts';
import { Segments } from '../ui/Segments.tsx';
import { EngineLine } from './head/EngineLine.tsx';
import { ExportMenu } from './head/ExportMenu.tsx';
import { StudyMenu } from './head/StudyMenu.tsx';
import { StudyName } from './head/StudyName.tsx';
import { KeysDialog } from './KeysDialog.tsx';
import { keysShown, shortcut } from './keyTable.ts';
import { useStudyPart } from './useStudyPart.ts';
import './panels.css';
import './head/head.css';

/** The top of the window: the study, what it stands on, and what can be done with the whole of it. */
export function HeadBar() {
  const { studyState, view, files } = useApp();
  const look = useStudyPart('look');
  const cosmologySet = useStudyPart('cosmologySet');
  const set = PUBLISHED_SETS.find((one) => one.key === cosmologySet);
  const { undoLabel, redoLabel } = studyState;
  const dark = view.theme.value === 'dark';
  return (
    <div class="head-bar">
      <h1 class="unseen">Conewright</h1>
      <StudyMenu />
      <StudyName />
      <EngineLine />
      <button
        type="button"
        class="button cosmology-button"
        title="Choose the cosmology"
        aria-label={`Cosmology: ${set?.name ?? 'own parameters'}`}
        onClick={() => revealSection('cosmology')}
      >
        {set?.name ?? 'Own parameters'}
      </button>
      <Segments
        label="Unit of length"
        value={look.perH ? 'perH' : 'mpc'}
        choices={[
          { value: 'mpc', label: 'Mpc' },
          { value: 'perH', label: 'Mpc/h', title: 'Lengths, volumes and densities in units of Mpc/h (H)' },
        ]}
        onChoose={(unit) =>
          studyState.perform(
            changeLook(unit === 'perH' ? 'Show Mpc/h' : 'Show Mpc', { perH: unit === 'perH' }),
          )
        }
      />
      <span class="head-group">
        <IconButton
          icon="undo"
          label={undoLabel.value === null ? 'Undo' : `Undo: ${undoLabel.value}`}
          detail={shortcut('Z')}
          disabled={undoLabel.value === null}
          onClick={() => studyState.undo()}
        />
        <IconButton
          icon="redo"
          label={redoLabel.value === null ? 'Redo' : `Redo: ${redoLabel.value}`}
          detail={shortcut('Z', true)}
          disabled={redoLabel.value === null}
          onClick={() => studyState.redo()}
        />
      </span>
      <button
        type="button"
        class={studyState.unsaved.value ? 'button accent-button' : 'button'}
        title={`Save the study (${shortcut('S')})`}
        onClick={() => void files.save()}
      >
        Save
      </button>
      <ExportMenu />
      <span class="head-group">
        <IconButton
          icon={dark ? 'sun' : 'moon'}
          label={dark ? 'Light theme' : 'Dark theme'}
          onClick={() => void (view.theme.value = dark ? 'light' : 'dark')}
        />
        <button
          type="button"
          class="button icon-button"
          aria-label="Keys"
          title="Keys (?)"
          onClick={() => void (keysShown.value = true)}
        >
          ?
        </button>
      </span>
      {keysShown.value ? <KeysDialog onClose={() => void (keysShown.value = false)} /> : null}
    </div>
  );
}
