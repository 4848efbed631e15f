/** What came down on the window, reduced to what decides. */
export interface Dropped {
  /** The kinds of the data ("Files", "text/plain" ...). */
  readonly types: readonly string[];
  readonly files: readonly { readonly name: string; readonly isFolder: boolean }[];
}

/** Which of the dropped files to open, and a sentence for each thing that is no file. */
export function sortDropped({ types, files }: Dropped): {
  readonly open: readonly number[];
  readonly sentences: readonly string[];
} {
  const open = files.flatMap((file, i) => (file.isFolder ? [] : [i]));
  const sentences = files
    .filter((file) => file.isFolder)
    .map((file) => `"${file.name}" is a folder: drop the catalogue or study file itself.`);
  if (files.length === 0) {
    const what = types.includes('text/uri-list')
      ? 'a link'
      : types.includes('text/plain')
        ? 'text'
        : 'something else';
    sentences.push(
      `What was dropped is ${what}, not a file: drop a catalogue (CSV or TSV, also gzipped) or a study.`,
    );
  }
  return { open, sentences };
}
