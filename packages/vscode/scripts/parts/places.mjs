// Where things lie in the repository, for the scripts of the extension.
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../../../..', import.meta.url));
export const EXTENSION = join(ROOT, 'packages/vscode');
export const SAMPLES = join(ROOT, 'samples');
export const SAMPLE = '05-two-pump.oilway';
export const CACHE = join(ROOT, '.cache');

/** The pinned Node of the repository, once installed: the tools and the TypeScript sources run on it, whatever the host has. */
export function pinnedNode() {
  const own = join(ROOT, 'node_modules/node/bin', process.platform === 'win32' ? 'node.exe' : 'node');
  return existsSync(own) ? own : process.execPath;
}
