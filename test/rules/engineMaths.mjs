// Finds elementary functions of the engine, whose last bits differ between engines. Sources are read by the bundler's parser.
import { readdirSync, readFileSync } from 'node:fs';
import { join, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseAst } from 'vite';

const root = fileURLToPath(new URL('../..', import.meta.url));
const HOME = 'shared-core/numerics/elementary';
const CURE = `import it from ${HOME}/elementary.ts (square, cube, powerOf or pow for **), which gives the same bits on every engine.`;

/** What the ECMAScript text fixes to the last bit. */
const EXACT = new Set(
  'PI E LN2 LN10 LOG2E LOG10E SQRT2 SQRT1_2 abs sign sqrt floor ceil round trunc fround min max imul clz32'.split(
    ' ',
  ),
);

/** One sentence for each use of an elementary function of the engine. @param {string} path @param {string} code @returns {string[]} */
export function engineMaths(path, code) {
  /** @type {string[]} */
  const out = [];
  /** @param {number} at @param {string} what */
  const tell = (at, what) =>
    out.push(
      `${path}:${code.slice(0, at).split('\n').length} uses ${what}, which engines round differently: ${CURE}`,
    );
  /** @param {any} node @param {any} parent */
  const walk = (node, parent) => {
    if (!node || typeof node !== 'object') return;
    if (Array.isArray(node)) {
      for (const item of node) walk(item, parent);
      return;
    }
    if (/^(Binary|Assignment)Expression$/.test(node.type) && /^\*\*=?$/.test(node.operator))
      tell(node.start, node.operator);
    if (node.type === 'Identifier' && node.name === 'Math') {
      const isRead = parent?.type === 'MemberExpression' && parent.object === node;
      if (!isRead || parent.computed) tell(node.start, 'Math as a whole');
      else if (!EXACT.has(parent.property.name)) tell(node.start, `Math.${parent.property.name}`);
    }
    for (const key of Object.keys(node)) if (key !== 'type') walk(node[key], node);
  };
  walk(parseAst(code, { lang: path.endsWith('.ts') ? 'ts' : 'js' }), null);
  return out;
}

/** All such uses in shared-core outside the folder that replaces them. @returns {string[]} */
export function allEngineMaths() {
  return readdirSync(join(root, 'shared-core'), { recursive: true, encoding: 'utf8' })
    .map((name) => join('shared-core', name).split(sep).join('/'))
    .filter((path) => path.endsWith('.ts') && !path.endsWith('.d.ts'))
    .flatMap((path) => engineMaths(path, readFileSync(join(root, path), 'utf8')));
}
