// Installs the locked packages where they are missing or not the ones the lock names. Needs nothing but Node itself.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** Why an installation is needed, or undefined. npm keeps what it installed in a lock of its own inside node_modules. */
export function whyInstall(root) {
  const kept = join(root, 'node_modules/.package-lock.json');
  if (!existsSync(kept)) return 'the packages are not installed yet';
  const installed = JSON.parse(readFileSync(kept, 'utf8')).packages;
  const locked = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')).packages;
  for (const [path, entry] of Object.entries(locked)) {
    if (path === '' || entry.optional || entry.link || !path.includes('node_modules/')) continue;
    const there = installed[path];
    if (!there) return `${path.replace(/^.*node_modules\//, '')} is missing`;
    if (there.version !== entry.version) return `${path.replace(/^.*node_modules\//, '')} is ${there.version}, locked is ${entry.version}`;
  }
  return undefined;
}

export function install(root) {
  const why = whyInstall(root);
  if (why === undefined) return;
  console.log(`Installing the locked packages (npm ci): ${why}.`);
  const done = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
    cwd: root,
    stdio: 'inherit',
    shell: process.platform === 'win32',
  });
  if (done.status !== 0) throw new Error('npm ci failed; its own messages stand above.');
}
