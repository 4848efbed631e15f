// What npm start uses of the hosts.
export { checkLaunchPaths, launchPaths } from '../files/launchPaths.ts';
export { electronArguments, electronProbe, fetchElectron } from '../launch/electronProbe.ts';
export { findBrowser, hasDisplay } from '../launch/findBrowser.ts';
export { runLocal } from './run.ts';
