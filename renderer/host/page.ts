import type { Purpose, WindowState } from '../../shared-core/bridge/messages.ts';

const ACCEPTED: Readonly<Record<Purpose, string>> = {
  // Any file: catalogues have many endings, and are judged by their contents.
  catalogue: '',
  study: '.json,application/json',
  region: '',
};

/** Lets the user pick files by the browser's own dialog. Empty when they give up. */
export function pickFiles(purpose: Purpose): Promise<File[]> {
  const input = document.createElement('input');
  input.type = 'file';
  input.multiple = purpose === 'catalogue';
  input.accept = ACCEPTED[purpose];
  input.hidden = true;
  // Some browsers forget an input that is not in the page while its dialog is open.
  document.body.append(input);
  return new Promise((resolve) => {
    const finish = (files: File[]) => {
      input.remove();
      resolve(files);
    };
    input.addEventListener('change', () => finish([...(input.files ?? [])]), { once: true });
    input.addEventListener('cancel', () => finish([]), { once: true });
    input.click();
  });
}

/** Hands a file to the browser's downloads. */
export function download(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The browser takes hold of the contents after this turn; a minute is ample, and frees what it no longer needs.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}

/** Shows the title; in a browser, closing with unsaved work lets the browser ask (it words the question itself). */
export function createStateDisplay(hostKind: 'desktop' | 'local'): (state: WindowState) => void {
  let asks = false;
  const ask = (event: BeforeUnloadEvent) => event.preventDefault();
  return ({ title, unsaved }) => {
    document.title = title;
    // Listened to only while there is something to lose; the desktop asks by itself.
    const wanted = unsaved && hostKind === 'local';
    if (wanted && !asks) addEventListener('beforeunload', ask);
    if (!wanted && asks) removeEventListener('beforeunload', ask);
    asks = wanted;
  };
}
