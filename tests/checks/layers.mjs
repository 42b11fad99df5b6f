// Layer check: dependency-cruiser over packages/, with proof that it looked at something.
import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
let json;
try {
  json = execFileSync(
    process.execPath,
    [
      'node_modules/dependency-cruiser/bin/dependency-cruise.mjs',
      '--config',
      '.dependency-cruiser.cjs',
      '--output-type',
      'json',
      'packages',
    ],
    {
      cwd: root,
      encoding: 'utf8',
      maxBuffer: 1 << 28,
    },
  );
} catch (error) {
  json = error.stdout;
  if (!json) throw error;
}
const { summary, modules } = JSON.parse(json);
const own = modules.filter((m) => m.source.startsWith('packages/'));
// A run that cruised nothing (wrong parser, wrong extension) must not look clean.
const linked = own.filter((m) => m.dependencies.some((d) => d.resolved.startsWith('packages/'))).length;
const problems = summary.violations.filter((v) => v.rule.severity === 'error');
for (const v of problems) console.log(`${v.rule.name}: ${v.from} -> ${v.to}`);
if (own.length < 100 || linked < 60) {
  console.log(`only ${own.length} modules seen, ${linked} of them with dependencies: the check itself is broken`);
  process.exit(1);
}
console.log(`layers: ${own.length} modules, ${problems.length} violations`);
process.exit(problems.length ? 1 : 0);
