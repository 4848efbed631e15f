import type { Bridge, HostQuestions } from '../../shared-core/bridge/contract.ts';
import { randomId } from './checks.ts';
import { createBridge } from './createBridge.ts';
import { connectDesktopWire, type DesktopApi, desktopFiles } from './desktopWire.ts';
import { downloadExporter, hostExporter } from './exporting.ts';
import { connectLocalWire, openWebSocketLine } from './localWire.ts';
import { createStateDisplay, download, pickFiles } from './page.ts';
import { pickedFiles } from './pickedFiles.ts';

declare global {
  interface Window {
    readonly conewright?: DesktopApi;
  }
}

/** Connects the page to whichever host shows it. Rejects with a Refusal when the host does not answer. */
export async function connectHost(questions: HostQuestions): Promise<Bridge> {
  const api = window.conewright;
  if (api !== undefined) {
    const wire = connectDesktopWire(api);
    return await createBridge({
      wire,
      files: desktopFiles(api, wire.windowId),
      exportFile: hostExporter(wire),
      questions,
      pickFiles,
      showState: createStateDisplay('desktop'),
    });
  }
  const base = new URL('.', location.href).href;
  const ownFetch = fetch.bind(window);
  const wire = await connectLocalWire({
    base,
    windowId: randomId(),
    fetch: ownFetch,
    openLine: openWebSocketLine,
  });
  return await createBridge({
    wire,
    files: pickedFiles({
      base,
      fetch: ownFetch,
      objectUrl: (file) => URL.createObjectURL(file),
      revokeUrl: (url) => URL.revokeObjectURL(url),
    }),
    exportFile: downloadExporter(download),
    questions,
    pickFiles,
    showState: createStateDisplay('local'),
  });
}
