/** The bundles of the extension load in a CommonJS host that offers nothing but `vscode`, and export what the editor calls. */
import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { runInThisContext } from 'node:vm';
import { beforeAll, expect, it } from 'vitest';

const dist = fileURLToPath(new URL('../../packages/vscode/dist', import.meta.url));
const require = createRequire(import.meta.url);

/** Stands for the editor's interface while modules load: every name is a class that can be extended. Nothing of it is called. */
const editor: object = new Proxy(
  {},
  {
    get: (_target, name) => (name === 'version' ? '1.101.0' : class {}),
  },
);

beforeAll(async () => {
  if (existsSync(`${dist}/node/extension.cjs`)) return;
  const builder = await import(new URL('../../packages/vscode/scripts/build.mjs', import.meta.url).href);
  await builder.buildExtension();
});

function load(file: string, node: boolean): Record<string, unknown> {
  const asked: string[] = [];
  const own = (name: string): unknown => {
    if (name === 'vscode') return editor;
    asked.push(name);
    if (node) return require(name);
    throw new Error(`a browser has no module ${name}`);
  };
  const module = { exports: {} };
  const path = `${dist}/${file}`;
  const run = runInThisContext(`(function (module, exports, require, __filename, __dirname) {${readFileSync(path, 'utf8')}\n})`);
  run(module, module.exports, own, path, dist);
  // Bundled means bundled: nothing but the host's own modules is asked for.
  const host = require('node:module').builtinModules as string[];
  expect(asked.filter((name) => !host.includes(name.replace(/^node:/, '')))).toEqual([]);
  return module.exports;
}

it.each([
  ['node/extension.cjs', true],
  ['web/extension.js', false],
] as const)('%s', (file, node) => {
  const { activate, deactivate } = load(file, node);
  expect([typeof activate, typeof deactivate]).toEqual(['function', 'function']);
});
