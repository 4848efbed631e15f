/** Drawings of 16 x 16 for the strip's tools, stroked with the colour of the text. */
const PATHS = {
  add: 'M5 2.5v11M9 8h5M11.5 5.5v5',
  split: 'M2 3.5v9M14 3.5v9M8 2.5v2.2m0 2.2v2.2m0 2.2v2.2',
  merge: 'M2 3.5v9M14 3.5v9M4 8h3m-1.4-1.6L7 8 5.6 9.6M12 8H9m1.4-1.6L9 8l1.4 1.6',
  remove: 'M2.5 3.5v9M13.5 3.5v9M6 6l4 4m0-4-4 4',
  snap: 'M4 2.5v5.5a4 4 0 0 0 8 0V2.5M4 5.5h2.5M9.5 5.5H12M6.5 2.5v5.5a1.5 1.5 0 0 0 3 0V2.5M4 2.5h2.5m3 0H12',
  all: 'M2.5 4v8M13.5 4v8M5 8h6M6.5 6 4.8 8l1.7 2M9.5 6l1.7 2-1.7 2',
  closer: 'M8 4v8M4 8h8',
  farther: 'M4 8h8',
  shells: 'M3 3.5v9M13 3.5v9M6.3 5.5v5M9.7 5.5v5',
  whole: 'M2.5 8 12.5 3.5a12 12 0 0 1 0 9Z',
} as const;

export type StripIconName = keyof typeof PATHS;

export function StripIcon({ name }: { readonly name: StripIconName }) {
  return (
    <svg class="icon strip-icon" viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      <path d={PATHS[name]} />
    </svg>
  );
}
