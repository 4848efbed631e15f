// A page that does nothing but connect to its host and lay the contract open to the test that drives it.
import { connectHost } from '../../../renderer/host/connect.ts';
import type { Bridge } from '../../../shared-core/bridge/contract.ts';
import type { ReadAnswer, ReadRequest } from './reader.ts';

export interface TestPage {
  bridge: Promise<Bridge>;
  /** What the page's questions are answered with. */
  saveName: string | null;
  mayReplace: boolean;
  lost: boolean;
  violations: string[];
  /** Loads an address in a worker. */
  readInWorker(request: ReadRequest): Promise<ReadAnswer>;
}

declare global {
  var testPage: TestPage;
}

const worker = new Worker(new URL('./reader.ts', import.meta.url), { type: 'module' });

globalThis.testPage = {
  bridge: connectHost({
    askSaveName: async ({ problem }) => (problem === null ? testPage.saveName : null),
    askOverwrite: async () => testPage.mayReplace,
  }),
  saveName: null,
  mayReplace: false,
  lost: false,
  violations: [],
  readInWorker: (request) =>
    new Promise((resolve) => {
      worker.onmessage = (event: MessageEvent<ReadAnswer>) => resolve(event.data);
      worker.postMessage(request);
    }),
};
addEventListener('securitypolicyviolation', (event) => {
  testPage.violations.push(`${event.violatedDirective} ${event.blockedURI}`);
});
testPage.bridge.then((bridge) => {
  bridge.onHostLost(() => {
    testPage.lost = true;
  });
  document.title = 'connected';
});
