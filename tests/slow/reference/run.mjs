/** `npm run test:reference`: the reference circuits through the program, SciPy and ngspice. Installs Debian's packages of both where they are missing. */
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const own = fileURLToPath(new URL('../../../node_modules/node/bin/node', import.meta.url));
const answers = (command, ...words) => spawnSync(command, words, { stdio: 'ignore' }).status === 0;

/** A Python that has SciPy: Debian's first, where its package puts it. */
const python = () => ['/usr/bin/python3', 'python3'].find((one) => answers(one, '-c', 'import scipy.integrate, scipy.optimize'));
const missing = () => [...(python() === undefined ? ['python3-scipy'] : []), ...(answers('ngspice', '--version') ? [] : ['ngspice'])];

function install(packages) {
  if (process.getuid?.() !== 0 || !answers('apt-get', '--version')) return;
  console.log(`installing ${packages.join(' and ')}`);
  spawnSync('apt-get', ['update', '-q'], { stdio: 'ignore' });
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  spawnSync('apt-get', ['install', '-y', '-q', '--no-install-recommends', ...packages], { stdio: ['ignore', 'ignore', 'inherit'], env });
}

if (Number.parseInt(process.versions.node, 10) < 24 && existsSync(own)) {
  // The sources are TypeScript: the pinned Node reads them as they are.
  process.exit(spawnSync(own, [fileURLToPath(import.meta.url)], { stdio: 'inherit' }).status ?? 1);
}
if (missing().length > 0) install(missing());
const absent = missing();
if (absent.length > 0) {
  console.log(
    `not run: ${absent.join(' and ')} missing, and not root with apt-get to install (Debian: apt-get install ${absent.join(' ')})`,
  );
  process.exit(1);
}
const { compareAll } = await import('./compare.ts');
process.exit(compareAll(python()) > 0 ? 1 : 0);
