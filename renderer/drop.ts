import { useEffect } from 'preact/hooks';
import { sortDropped } from './panels/dropped.ts';
import type { App } from './state/app.ts';

/** Takes files dropped anywhere on the window. */
export function useDrop(app: App): void {
  useEffect(() => {
    // Entering a child comes before leaving its parent, so that depth is 0 only outside of the window.
    let depth = 0;
    const show = (on: boolean): void => {
      if (on) document.documentElement.dataset.dropping = '';
      else delete document.documentElement.dataset.dropping;
    };
    const carriesFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;
    // Text dragged into a field is the field's business.
    const forField = (event: DragEvent): boolean =>
      !carriesFiles(event) &&
      event.target instanceof Element &&
      event.target.closest('input, textarea') !== null;

    const onEnter = (event: DragEvent): void => {
      depth++;
      if (carriesFiles(event)) show(true);
    };
    const onLeave = (): void => {
      depth = Math.max(0, depth - 1);
      if (depth === 0) show(false);
    };
    const onOver = (event: DragEvent): void => {
      if (forField(event)) return;
      event.preventDefault();
      if (event.dataTransfer !== null) event.dataTransfer.dropEffect = 'copy';
    };
    const onDrop = (event: DragEvent): void => {
      depth = 0;
      show(false);
      if (forField(event)) return;
      event.preventDefault();
      if (event.dataTransfer !== null) take(app, event.dataTransfer);
    };
    window.addEventListener('dragenter', onEnter);
    window.addEventListener('dragleave', onLeave);
    window.addEventListener('dragover', onOver);
    window.addEventListener('drop', onDrop);
    return () => {
      window.removeEventListener('dragenter', onEnter);
      window.removeEventListener('dragleave', onLeave);
      window.removeEventListener('dragover', onOver);
      window.removeEventListener('drop', onDrop);
      show(false);
    };
  }, [app]);
}

function take(app: App, data: DataTransfer): void {
  // The list of items is emptied as soon as this function has returned: look at it now.
  const items = [...data.items].filter((item) => item.kind === 'file');
  const found = items.flatMap((item) => {
    const file = item.getAsFile();
    return file === null ? [] : [{ file, isFolder: item.webkitGetAsEntry()?.isDirectory ?? false }];
  });
  const { open, sentences } = sortDropped({
    types: [...data.types],
    files: found.map(({ file, isFolder }) => ({ name: file.name, isFolder })),
  });
  for (const sentence of sentences) app.notices.tell(sentence);
  if (open.length === 0) return;
  app.bridge
    .adoptDropped(open.map((i) => found[i]!.file))
    .then((files) => app.files.openFiles(files))
    .catch((error: unknown) => app.notices.tell(error instanceof Error ? error.message : String(error)));
}
