// What `npm start` shows in the terminal: the sample checked and run by the `oilway` command.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { pinnedNode, ROOT, SAMPLE } from './places.mjs';

/** Runs `oilway` and returns its exit code: 0 clean, 1 findings, 2 cannot run. */
function oilway(...args) {
  console.log(`\n$ oilway ${args.join(' ')}\n`);
  const done = spawnSync(pinnedNode(), [join(ROOT, 'packages/cli/bin/oilway.mjs'), ...args], { cwd: ROOT, stdio: 'inherit' });
  if (done.error) throw done.error;
  return done.status ?? 2;
}

/** A finding is no failure here; a command that cannot run is. */
export function showInTerminal() {
  for (const command of ['check', 'run']) {
    const code = oilway(command, `samples/${SAMPLE}`);
    if (code > 1) throw new Error(`oilway ${command} could not run (exit code ${code}).`);
  }
}
