import { computed, effect } from '@preact/signals';
import { createContext } from 'preact';
import { useContext } from 'preact/hooks';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { demoStudy } from './demoStudy.ts';
import { createDerived, type Derived } from './derived.ts';
import { createEngineState, type EngineState } from './engineState.ts';
import { createFileState, type FileState } from './fileState.ts';
import { createNotices, type Notices } from './notices.ts';
import { createQuestions, type Questions } from './questions.ts';
import { createStudyState, type StudyState } from './studyState.ts';
import { createViewState, NOTHING_TYPED, type ViewState } from './viewState.ts';

/** All that a panel may ask: it finds this through `useApp()`. */
export interface App {
  readonly bridge: Bridge;
  readonly notices: Notices;
  readonly questions: Questions;
  readonly studyState: StudyState;
  readonly engine: EngineState;
  readonly derived: Derived;
  readonly view: ViewState;
  readonly files: FileState;
  /** Gives up reading the catalogue: what was open before it is open again. False when none is being read. */
  cancelReading(): boolean;
}

export function createApp(
  bridge: Bridge,
  options: {
    readonly theme: 'light' | 'dark';
    readonly questions?: Questions;
    readonly makeWorker?: () => Worker;
  },
): App {
  const notices = createNotices();
  const questions = options.questions ?? createQuestions();
  const studyState = createStudyState(demoStudy(), notices);
  const files = createFileState({
    bridge,
    notices,
    studyState,
    askLeave: (name) => questions.askLeave(name),
    askReplace: (sentence) => questions.askReplace(sentence),
    askOther: (question) => questions.askOther(question),
  });
  const view = createViewState(options.theme);
  const engine = createEngineState(studyState, files.engineSource, view.pictureColour, options.makeWorker);
  bridge.onHostLost(() =>
    notices.tell(
      'The program behind this window has ended, so nothing can be saved from here: start it again, and unsaved work is offered back.',
    ),
  );
  // The fingerprint of a file is known once it has been read whole; from then on a change of the file is told.
  effect(() => {
    const loaded = engine.loadedNow.value;
    const { source } = studyState.study.value;
    if (loaded === null || source?.kind !== 'file' || source.sha256 !== null) return;
    if (loaded.sizeBytes === source.sizeBytes) files.noteFingerprint(loaded.sha256);
  });
  // What cannot be read is nothing to go back to.
  effect(() => {
    if (engine.failure.value?.stage === 'load') files.noteReading(false);
    else if (engine.loadedNow.value !== null) files.noteReading(true);
  });
  const derived = createDerived(studyState, engine);
  // What was pointed at belongs to the catalogue that was open then.
  const source = computed(() => JSON.stringify(files.engineSource.value));
  effect(() => {
    void source.value;
    view.selectedShell.value = null;
    view.redshiftWindow.value = null;
    view.typedRange.value = NOTHING_TYPED;
    view.field.value = 0;
  });
  effect(() => {
    void engine.selected.value;
    view.pickedGalaxies.value = [];
    view.measuring.value = false;
  });
  return {
    bridge,
    notices,
    questions,
    studyState,
    engine,
    derived,
    view,
    files,
    cancelReading() {
      const reading = files.engineSource.value;
      if (engine.progress.value?.stage !== 'load' || reading?.kind !== 'url') return false;
      // Where the same file is read again for other columns, only what asked for that is taken back.
      const read = engine.loadedNow.value;
      const before = read === null ? files.beforeOpening.value : files.askedBefore(read.readFor);
      if (before === null)
        engine.giveUpReading(
          `Reading ${reading.name} was cancelled: the study is open without its galaxies. Press "Read again" to have them.`,
        );
      else {
        studyState.backTo(before);
        notices.tell(`Reading ${reading.name} was cancelled: everything is as it was before.`, {
          tone: 'fact',
        });
      }
      return true;
    },
  };
}

export const AppContext = createContext<App | null>(null);

/** The app that this part of the window belongs to. */
export function useApp(): App {
  const app = useContext(AppContext);
  if (app === null) throw new Error('useApp outside of the window');
  return app;
}
