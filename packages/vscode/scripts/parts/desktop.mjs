// Opens the samples in the user's own VS Code, with Oilway in it, in a profile of its own: nothing of the user's set-up is touched.
import { spawn, spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { CACHE, EXTENSION, SAMPLE, SAMPLES } from './places.mjs';

const windows = process.platform === 'win32';

const number = (version) => version.split('.').map(Number);

const older = (a, b) => {
  const [x, y] = [number(a), number(b)];
  const at = [0, 1, 2].find((i) => (x[i] ?? 0) !== (y[i] ?? 0));
  return at !== undefined && (x[at] ?? 0) < (y[at] ?? 0);
};

/** Whether a VS Code on the PATH can be used: `{ version }`, or `{ why }` not. */
export function findDesktop(env = process.env) {
  if (env.VSCODE_IPC_HOOK_CLI) return { why: 'this terminal belongs to a remote VS Code, which loads no extension from a folder' };
  if (process.platform === 'linux' && !env.DISPLAY && !env.WAYLAND_DISPLAY) return { why: 'there is no screen here' };
  const asked = spawnSync('code', ['--version'], { encoding: 'utf8', env, shell: windows });
  const version = asked.stdout?.split(/\r?\n/)[0]?.trim() ?? '';
  if (asked.error || asked.status !== 0 || !/^\d+\.\d+/.test(version)) return { why: 'no `code` on the PATH' };
  const needed = JSON.parse(readFileSync(join(EXTENSION, 'package.json'), 'utf8')).engines.vscode.replace('^', '');
  if (older(version, needed)) return { why: `VS Code ${version} is older than ${needed}` };
  return { version };
}

export const desktopArguments = () => [
  '--new-window',
  '--wait',
  `--extensionDevelopmentPath=${EXTENSION}`,
  `--user-data-dir=${join(CACHE, 'vscode-profile')}`,
  `--extensions-dir=${join(CACHE, 'vscode-extensions')}`,
  '--disable-workspace-trust',
  SAMPLES,
  '--goto',
  join(SAMPLES, SAMPLE),
];

/** Settles when the window is closed or the process is interrupted. */
export function openDesktop(version, env = process.env) {
  console.log(`\nOpening samples/${SAMPLE} in VS Code ${version}, in a profile of its own (.cache/vscode-profile). Ctrl+C ends this.`);
  return new Promise((done, fail) => {
    const window = spawn('code', desktopArguments(), { stdio: 'inherit', env, shell: windows });
    window.on('error', fail);
    window.on('exit', (code, signal) => (code === 0 || signal ? done() : fail(new Error(`VS Code ended with code ${code}.`))));
  });
}
