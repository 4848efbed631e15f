// npm run bench: measures ratios in one run, each against what a user would otherwise use. Times swing; ratios hold.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { install, root } from '../../main/launch/install.mjs';

install();
const { createServer } = await import('vite');
const server = await createServer({
  configFile: false,
  root,
  appType: 'custom',
  server: { middlewareMode: true, ws: false },
  logLevel: 'error',
});
const all = ['distances', 'catalogue', 'shells', 'points', 'window'];
const only = process.argv.slice(2);
const chosen = all.filter((n) => only.includes(n));
const names = chosen.length === 0 ? all : chosen;
// What names no bench goes to the benches: npm run bench -- window large stacks
const words = only.filter((n) => !all.includes(n));
try {
  for (const name of names) {
    const { bench } = await server.ssrLoadModule(pathToFileURL(join(root, `test/bench/${name}.ts`)).pathname);
    const { name: title, rows } = await bench(words);
    console.log(`\n${title}`);
    for (const row of rows)
      console.log(
        `  ${row.what.padEnd(64)} ${row.seconds.toFixed(3).padStart(9)} s   x ${row.ratio.toFixed(2)}`,
      );
  }
} finally {
  await server.close();
}
