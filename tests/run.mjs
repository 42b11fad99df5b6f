// `npm test`: every check but the slow suites, from a fresh clone (installs what is missing). Runs on Node 20; the tools run on the pinned Node.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const output = join(root, 'tests/output');
const bin = (name) => join(root, 'node_modules', name);

/** Installs the locked packages when they are missing or older than the lock file. */
function install() {
  const stamp = join(root, 'node_modules/.package-lock.json');
  if (existsSync(stamp) && statSync(stamp).mtimeMs >= statSync(join(root, 'package-lock.json')).mtimeMs - 1000) return;
  console.log('installing the locked packages (npm ci)');
  const done = spawnSync('npm', ['ci'], { cwd: root, stdio: 'inherit', shell: process.platform === 'win32' });
  if (done.status !== 0) throw new Error('npm ci failed');
}

function nodePath() {
  const own = join(root, 'node_modules/node/bin', process.platform === 'win32' ? 'node.exe' : 'node');
  return existsSync(own) ? own : process.execPath;
}

const chromium =
  ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'].find((p) => existsSync(p)) ?? process.env.OILWAY_CHROMIUM;

/** One line a check; `counts` reads a vitest JSON report. */
const checks = [
  { name: 'types', run: [bin('typescript/bin/tsc'), '--noEmit', '-p', 'tsconfig.json'] },
  {
    name: 'portable packages compile without Node and DOM types',
    run: [bin('typescript/bin/tsc'), '--noEmit', '-p', 'tsconfig.portable.json'],
  },
  { name: 'style (biome)', run: [bin('@biomejs/biome/bin/biome'), 'ci', '.'] },
  { name: 'layers', run: ['tests/checks/layers.mjs'] },
  { name: 'unused code (knip)', run: [bin('knip/bin/knip.js'), '--no-progress'] },
  { name: 'build', run: ['packages/vscode/scripts/build.mjs'] },
  {
    name: 'tests',
    run: [bin('vitest/vitest.mjs'), 'run', '--reporter=default', '--reporter=json', '--outputFile.json=tests/output/tests.json'],
    counts: 'tests.json',
  },
  {
    name: 'editor',
    run: [
      bin('vitest/vitest.mjs'),
      'run',
      '--config',
      'vitest.editor.config.ts',
      '--reporter=default',
      '--reporter=json',
      '--outputFile.json=tests/output/editor.json',
    ],
    counts: 'editor.json',
    needs: chromium,
    without: 'no Chromium found (Debian: apt-get install chromium): the editor suite was not run',
  },
];

install();
mkdirSync(output, { recursive: true });
const only = process.argv.slice(2);
let passed = 0;
let failed = 0;
const lines = [];
for (const check of checks) {
  if (only.length && !only.includes(check.name)) continue;
  if ('needs' in check && !check.needs) {
    // On a build machine the browser is part of the set-up: its absence is a failure there.
    if (process.env.CI) failed += 1;
    lines.push(`${process.env.CI ? 'FAILED ' : 'not run'}  ${check.name}: ${check.without}`);
    continue;
  }
  console.log(`\n== ${check.name}`);
  const started = Date.now();
  if (check.counts) rmSync(join(output, check.counts), { force: true });
  const done = spawnSync(nodePath(), check.run, { cwd: root, stdio: 'inherit', env: { ...process.env, OILWAY_CHROMIUM: chromium ?? '' } });
  const seconds = ((Date.now() - started) / 1000).toFixed(1);
  let [p, f] = done.status === 0 ? [1, 0] : [0, 1];
  if (check.counts && existsSync(join(output, check.counts))) {
    const report = JSON.parse(readFileSync(join(output, check.counts), 'utf8'));
    p = report.numPassedTests;
    // A suite that breaks before its first test has no failed test, but has failed.
    f = Math.max(report.numFailedTests, done.status === 0 ? 0 : 1);
    if (p + f === 0) f = 1;
  }
  passed += p;
  failed += f;
  lines.push(`${f ? 'FAILED ' : 'passed '}  ${check.name}: ${p} passed, ${f} failed, ${seconds} s`);
}
console.log(`\n${lines.join('\n')}\n`);
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed ? 1 : 0);
