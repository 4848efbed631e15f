// npm run -s conewright -- VERB ...: installs and builds what is missing, then runs the command.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from './build.mjs';
import { install, root } from './install.mjs';

install();
await build(['command']);
const { run } = await import(pathToFileURL(join(root, 'build/command/conewright.js')).href);
process.exitCode = await run(process.argv.slice(2));
