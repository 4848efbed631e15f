// Holds the import rule of layers.json against every source file. Imports are read by the bundler's own parser.
import { readdirSync, readFileSync } from 'node:fs';
import { builtinModules } from 'node:module';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseAst } from 'vite';

const root = fileURLToPath(new URL('../..', import.meta.url));
const rule = JSON.parse(readFileSync(new URL('./layers.json', import.meta.url), 'utf8'));

/** @param {string} folder @returns {string[]} */
function sources(folder) {
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .map((name) => join(folder, name).split(sep).join('/'))
    .filter((name) => /\.(ts|tsx|mjs)$/.test(name) && !name.endsWith('.d.ts'));
}

/** The longest folder of the rule that holds this path. @param {string} path */
export function layerOf(path) {
  return Object.keys(rule.layers)
    .filter((layer) => path === layer || path.startsWith(`${layer}/`))
    .sort((a, b) => b.length - a.length)[0];
}

/** Every module text named by import, export from, import() and new URL(..., import.meta.url).
 * @param {string} code @param {string} path @returns {string[]} */
export function importedNames(code, path) {
  /** @type {Set<string>} */
  const found = new Set();
  const lang = path.endsWith('.tsx') ? 'tsx' : path.endsWith('.ts') ? 'ts' : 'js';
  /** @param {any} node */
  const walk = (node) => {
    if (!node || typeof node !== 'object') return;
    if (Array.isArray(node)) {
      for (const item of node) walk(item);
      return;
    }
    if (typeof node.source?.value === 'string' && /^(Import|Export)/.test(node.type))
      found.add(node.source.value);
    if (node.type === 'TSImportType' && typeof node.source?.value === 'string') found.add(node.source.value);
    if (
      node.type === 'NewExpression' &&
      node.callee?.name === 'URL' &&
      node.arguments[1]?.type === 'MemberExpression' &&
      typeof node.arguments[0]?.value === 'string'
    )
      found.add(node.arguments[0].value);
    for (const key of Object.keys(node)) if (key !== 'type') walk(node[key]);
  };
  walk(parseAst(code, { lang }));
  return [...found];
}

/** One sentence for each import that the rule forbids. @param {string} path @param {string} code @returns {string[]} */
export function breaches(path, code) {
  const layer = layerOf(path);
  if (layer === undefined)
    return [`${path} lies in no layer of test/rules/layers.json: add its folder there.`];
  const { imports, packages } = rule.layers[layer];
  const host = layer.startsWith('main') || layer.startsWith('test');
  const out = [];
  for (const name of importedNames(code, path)) {
    if (name.startsWith('.')) {
      const target = relative(root, join(root, dirname(path), name))
        .split(sep)
        .join('/');
      const to = layerOf(target);
      if (to === undefined) {
        if (layer.startsWith('test') || host) continue;
        out.push(`${path} imports ${name}, which lies outside every layer. ${rule.cure}`);
        continue;
      }
      const allowed =
        to === layer || imports.some((/** @type {string} */ i) => target === i || target.startsWith(`${i}/`));
      if (!allowed) out.push(`${path} imports ${target}: ${layer} may not know ${to}. ${rule.cure}`);
    } else if (name.startsWith('node:') || builtinModules.includes(name)) {
      if (!host) out.push(`${path} imports ${name}: only main and test run in Node. ${rule.cure}`);
    } else {
      const pack = name.startsWith('@') ? name.split('/').slice(0, 2).join('/') : String(name.split('/')[0]);
      const isBundlerFile = pack === 'vite' && path.endsWith('.vite.ts');
      if (!isBundlerFile && !packages.includes('*') && !packages.includes(pack))
        out.push(
          `${path} imports the package ${pack}, which ${layer} may not use (test/rules/layers.json). ${rule.cure}`,
        );
    }
  }
  return out;
}

/** All breaches of the tree. @returns {string[]} */
export function allBreaches() {
  return ['shared-core', 'renderer', 'main', 'test']
    .flatMap(sources)
    .flatMap((path) => breaches(path, readFileSync(join(root, path), 'utf8')));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const all = allBreaches();
  for (const line of all) console.error(line);
  process.exit(all.length === 0 ? 0 : 1);
}
