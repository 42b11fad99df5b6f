// Builds the extension on the pinned Node, in a process of its own: the starting script has no packages before the installation.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { EXTENSION, pinnedNode, ROOT } from './places.mjs';

export function build() {
  const done = spawnSync(pinnedNode(), [join(EXTENSION, 'scripts/build.mjs')], { cwd: ROOT, stdio: 'inherit' });
  if (done.status !== 0) throw new Error('The build failed; its messages stand above.');
}
