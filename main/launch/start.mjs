// npm start [FILE...]: installs what is missing, builds what is stale, and runs the main job.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from './build.mjs';
import { install, root } from './install.mjs';

install();
await build(['command']);
const { run } = await import(pathToFileURL(join(root, 'build/command/conewright.js')).href);
console.error('conewright: the invented demo survey, its shell ledger, and its tables in conewright-demo/');
process.exitCode = await run(['demo', '-o', 'conewright-demo']);
