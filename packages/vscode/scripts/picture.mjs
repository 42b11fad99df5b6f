// `npm run picture`: builds the extension and takes the picture of the README anew (images/editor.png).
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build } from './parts/build.mjs';
import { pinnedNode, ROOT } from './parts/places.mjs';

build();
const done = spawnSync(pinnedNode(), [join(ROOT, 'tests/support/rig/picture.ts')], { cwd: ROOT, stdio: 'inherit' });
process.exitCode = done.status ?? 1;
