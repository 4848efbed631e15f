import { useRef } from 'preact/hooks';
import { change } from '../../../shared-core/study/edits.ts';
import { useApp } from '../../state/app.ts';
import { useStudyPart } from '../useStudyPart.ts';

/** The study's name, changed where it stands, and the mark of unsaved work. */
export function StudyName() {
  const { studyState, notices } = useApp();
  const input = useRef<HTMLInputElement>(null);
  const name = useStudyPart('name');
  const commit = (): void => {
    const field = input.current;
    if (field === null) return;
    const typed = field.value.trim();
    if (typed === name) return;
    if (typed === '') {
      notices.tell('The study needs a name: the old one was kept.');
      field.value = name;
    } else studyState.perform(change(`Rename to "${typed}"`, { name: typed }));
  };
  return (
    <span class="study-name">
      <input
        ref={input}
        type="text"
        aria-label="Name of the study"
        title="Name of the study"
        maxLength={200}
        spellcheck={false}
        autocomplete="off"
        value={name}
        onBlur={commit}
        onKeyDown={(e) => {
          if (e.key === 'Enter') e.currentTarget.blur();
          if (e.key === 'Escape') {
            e.currentTarget.value = name;
            e.currentTarget.blur();
          }
        }}
      />
      <span class="unsaved" role="status">
        {studyState.unsaved.value ? 'not saved' : ''}
      </span>
    </span>
  );
}
