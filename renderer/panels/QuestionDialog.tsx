import { useLayoutEffect, useRef, useState } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import type { Question } from '../state/questions.ts';
import { Dialog } from '../ui/Dialog.tsx';
import './panels.css';
import './notices.css';

/** The question that everything waits for, if there is one. */
export function QuestionDialog() {
  const question = useApp().questions.open.value;
  return question === null ? null : (
    <OneQuestion key={`${question.title} ${question.text}`} question={question} />
  );
}

function OneQuestion({ question }: { readonly question: Question }) {
  const { questions } = useApp();
  const { title, text, field, answers } = question;
  const [typed, setTyped] = useState(field?.value ?? '');
  const first = useRef<HTMLElement>(null);
  useLayoutEffect(() => {
    first.current?.focus();
    if (first.current instanceof HTMLInputElement) first.current.select();
  }, []);
  const safe = answers[0]!.key;
  const usual = answers.at(-1)!;
  return (
    <Dialog
      title={title}
      closeButton={false}
      lightDismiss={false}
      onClose={() => questions.answer(safe, typed)}
    >
      <form
        class="question"
        onSubmit={(e) => {
          e.preventDefault();
          questions.answer(usual.key, typed);
        }}
      >
        <p>{text}</p>
        {field === null ? null : (
          <label class="field question-field">
            <span>{field.label}</span>
            <span class="field-box">
              <input
                ref={first as never}
                type="text"
                value={typed}
                spellcheck={false}
                autocomplete="off"
                onInput={(e) => setTyped(e.currentTarget.value)}
              />
            </span>
          </label>
        )}
        <div class="question-answers">
          {answers.map(({ key, label, danger = false }) => {
            const last = key === usual.key;
            return (
              <button
                key={key}
                type={last ? 'submit' : 'button'}
                class={danger ? 'button danger-button' : last ? 'button accent-button' : 'button'}
                {...(last && field === null ? { ref: first as never } : {})}
                {...(last ? {} : { onClick: () => questions.answer(key, typed) })}
              >
                {label}
              </button>
            );
          })}
        </div>
      </form>
    </Dialog>
  );
}
