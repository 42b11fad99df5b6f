// Opens the samples in the browser: the rig serves an editor with Oilway in it and writes to the real files.
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { pinnedNode, ROOT, SAMPLE, SAMPLES } from './places.mjs';

/** Settles when the rig is interrupted; fails where it cannot start (its own words stand in the terminal). */
export function openWeb(more = []) {
  const args = [join(ROOT, 'tests/support/rig/main.ts'), '--workspace', SAMPLES, '--open', `/${SAMPLE}`, ...more];
  return new Promise((done, fail) => {
    const rig = spawn(pinnedNode(), args, { cwd: ROOT, stdio: 'inherit' });
    rig.on('error', fail);
    rig.on('exit', (code, signal) => (code === 0 || signal ? done() : fail(new Error('The editor in the browser did not start.'))));
  });
}
