// Builds the extension into dist/: extension, language server and study worker, once for node and once for the browser, and the grammar.
import { cpSync, existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const here = fileURLToPath(new URL('..', import.meta.url));
const root = join(here, '../..');
const dist = join(here, 'dist');
const language = join(root, 'packages/language');

const common = {
  bundle: true,
  sourcemap: true,
  sourcesContent: false,
  minify: false,
  keepNames: true,
  target: 'es2022',
  logLevel: 'warning',
};

/** CommonJS for the node host. `import.meta.url` has no meaning there: it becomes the address of the bundle's own file. */
const node = {
  ...common,
  platform: 'node',
  format: 'cjs',
  external: ['vscode'],
  define: { 'import.meta.url': '__bundleUrl' },
  banner: { js: "const __bundleUrl = require('node:url').pathToFileURL(__filename).href;" },
};

/** The web extension host loads CommonJS; workers are plain scripts. */
const web = { ...common, platform: 'browser', conditions: ['browser'], mainFields: ['browser', 'module', 'main'], external: ['vscode'] };

const BUNDLES = [
  { from: join(here, 'extension/node.ts'), to: 'node/extension.cjs', with: node },
  { from: join(here, 'extension/web.ts'), to: 'web/extension.js', with: { ...web, format: 'cjs' } },
  { from: join(language, 'server/node.ts'), to: 'node/server.cjs', with: node },
  { from: join(language, 'server/browser.ts'), to: 'web/server.js', with: { ...web, format: 'iife' } },
  { from: join(language, 'server/study-worker-node.ts'), to: 'node/study-worker.cjs', with: node },
  { from: join(language, 'server/study-worker-browser.ts'), to: 'web/study-worker.js', with: { ...web, format: 'iife' } },
];

/** All or nothing: what stood in dist/ stays where a bundle cannot be made. */
export async function buildExtension() {
  const grammar = join(root, 'syntaxes/oilway.tmLanguage.json');
  if (!existsSync(grammar)) throw new Error(`The grammar is missing: ${grammar}. It is generated from the kind and unit tables.`);
  const made = [];
  for (const bundle of BUNDLES) {
    const { outputFiles } = await build({ ...bundle.with, entryPoints: [bundle.from], outfile: join(dist, bundle.to), write: false });
    made.push(...outputFiles);
  }
  rmSync(dist, { recursive: true, force: true });
  for (const { path, contents } of made) {
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(path, contents);
  }
  cpSync(grammar, join(dist, 'oilway.tmLanguage.json'));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const began = performance.now();
  await buildExtension();
  console.log(`Built packages/vscode/dist in ${((performance.now() - began) / 1000).toFixed(1)} s.`);
}
