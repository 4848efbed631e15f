import './ui.css';

/** Drawings of 16 x 16, stroked with the colour of the text around them. */
const PATHS = {
  undo: 'M6.5 3 3 6.5 6.5 10M3.5 6.5H10a3.25 3.25 0 0 1 0 6.5H7',
  redo: 'M9.5 3 13 6.5 9.5 10M12.5 6.5H6a3.25 3.25 0 0 0 0 6.5h3',
  close: 'm4 4 8 8m0-8-8 8',
  down: 'm4 6.5 4 4 4-4',
  before: 'm10 3.5-4.5 4.5 4.5 4.5',
  after: 'm6 3.5 4.5 4.5-4.5 4.5',
  plus: 'M8 3v10M3 8h10',
  edit: 'm3 13 .6-2.8 6.9-6.9 2.2 2.2-6.9 6.9zM9.3 4.5l2.2 2.2',
  widen: 'M2.5 8h11M5 5.25 2.25 8 5 10.75m6-5.5L13.75 8 11 10.75',
  sun: 'M8 5.25a2.75 2.75 0 1 0 0 5.5 2.75 2.75 0 0 0 0-5.5M8 1.5v1.3m0 10.4v1.3M1.5 8h1.3m10.4 0h1.3M3.4 3.4l.9.9m7.4 7.4.9.9m0-9.2-.9.9m-7.4 7.4-.9.9',
  moon: 'M13 9.7A5.5 5.5 0 1 1 6.3 3a4.4 4.4 0 0 0 6.7 6.7Z',
  up: 'M8 12.5v-9M4.5 7 8 3.5 11.5 7',
  sink: 'M8 3.5v9M4.5 9 8 12.5 11.5 9',
} as const;

export type IconName = keyof typeof PATHS;

/** A drawing that says nothing to a screen reader: the control around it carries the words. */
export function Icon({ name }: { readonly name: IconName }) {
  return (
    <svg class={`icon icon-${name}`} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      <path d={PATHS[name]} />
    </svg>
  );
}
