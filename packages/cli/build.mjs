/** Bundles the command into dist/oilway.mjs: one file without dependencies. */
import { existsSync, readdirSync, renameSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const here = dirname(fileURLToPath(import.meta.url));
const packages = dirname(here);
export const BUNDLE = join(here, 'dist', 'oilway.mjs');

/** Newest change of any source the bundle is made of, ms. */
function newestSource(folder) {
  let newest = 0;
  for (const entry of readdirSync(folder, { withFileTypes: true })) {
    if (entry.name === 'node_modules' || entry.name === 'dist' || entry.name === 'vscode' || entry.name.startsWith('.')) continue;
    const path = join(folder, entry.name);
    if (entry.isDirectory()) newest = Math.max(newest, newestSource(path));
    else if (/\.(ts|mjs|json)$/.test(entry.name)) newest = Math.max(newest, statSync(path).mtimeMs);
  }
  return newest;
}

/** True in a checkout whose sources are newer than the bundle, or where there is no bundle. */
export function stale() {
  if (!existsSync(BUNDLE)) return true;
  if (!existsSync(join(here, 'main.ts'))) return false;
  return newestSource(packages) > statSync(BUNDLE).mtimeMs;
}

/** Builds the bundle. Throws with esbuild's own words where it cannot. */
export async function build() {
  const { build: bundle } = await import('esbuild');
  // Written beside and renamed: another process never reads half a bundle.
  const fresh = `${BUNDLE}.${process.pid}`;
  await bundle({
    stdin: {
      contents: "import { start } from './main.ts';\nawait start();\n",
      resolveDir: here,
      sourcefile: 'entry.ts',
      loader: 'ts',
    },
    outfile: fresh,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    legalComments: 'none',
    logLevel: 'silent',
    // CommonJS dependencies ask for Node's own modules by `require`.
    banner: { js: "import { createRequire as _createRequire } from 'node:module'; const require = _createRequire(import.meta.url);" },
  });
  renameSync(fresh, BUNDLE);
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  await build();
  console.log(BUNDLE);
}
