/** Bundles the server and its study worker as the extension ships them, into a folder of this run. */
import { mkdtempSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const root = fileURLToPath(new URL('../../..', import.meta.url));

/** Folder with `server.cjs` and `study-worker.cjs`. */
export async function bundleServer(): Promise<string> {
  const output = join(root, 'tests/output');
  mkdirSync(output, { recursive: true });
  const folder = mkdtempSync(join(output, 'server-'));
  for (const [from, to] of [
    ['node.ts', 'server.cjs'],
    ['study-worker-node.ts', 'study-worker.cjs'],
  ] as const) {
    await build({
      entryPoints: [join(root, 'packages/language/server', from)],
      outfile: join(folder, to),
      bundle: true,
      platform: 'node',
      format: 'cjs',
      target: 'es2022',
      logLevel: 'silent',
      define: { 'import.meta.url': '__bundleUrl' },
      banner: { js: "const __bundleUrl = require('node:url').pathToFileURL(__filename).href;" },
    });
  }
  return folder;
}

/** The two scripts of the web: server and study worker. Nothing of Node may be in them, or bundling fails. */
export async function bundleWeb(): Promise<{ readonly server: string; readonly study: string }> {
  const text = async (from: string): Promise<string> => {
    const { outputFiles } = await build({
      entryPoints: [join(root, 'packages/language/server', from)],
      bundle: true,
      write: false,
      platform: 'browser',
      conditions: ['browser'],
      mainFields: ['browser', 'module', 'main'],
      format: 'iife',
      target: 'es2022',
      logLevel: 'silent',
    });
    return outputFiles[0]?.text ?? '';
  };
  return { server: await text('browser.ts'), study: await text('study-worker-browser.ts') };
}
