// npm run -s conewright -- VERB ...: installs and builds what is missing, then runs the command.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from './build.mjs';
import { install, root } from './install.mjs';

// A reader that has seen enough (head, less) closes the pipe: no error.
process.stdout.on('error', (error) => {
  if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EPIPE') process.exit(0);
  throw error;
});

install();
const words = process.argv.slice(2);
// Pictures are drawn by the window's own code in a browser without a window.
await build(words[0] === 'picture' ? ['command', 'window'] : ['command']);
const { run } = await import(pathToFileURL(join(root, 'build/command/conewright.js')).href);
process.exitCode = await run(words, undefined, join(root, 'build/window'));
