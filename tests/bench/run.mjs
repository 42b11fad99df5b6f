/** `npm run bench`: all measurements in one table. Never fails: a tool that is missing is a row that says so. `npm run bench -- engine` runs one part. */
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { availableParallelism, cpus, loadavg } from 'node:os';
import { fileURLToPath } from 'node:url';

const PARTS = ['engine', 'others', 'memory', 'latency'];
/** A part that takes longer is ended, ms. */
const LONGEST = 150_000;

// The sources are TypeScript: the pinned Node reads them as they are.
const pinned = fileURLToPath(new URL('../../node_modules/node/bin/node', import.meta.url));
const node = existsSync(pinned) ? pinned : process.execPath;

/** Rows of a part, and what it said where it ended badly. */
function rowsOf(part) {
  return new Promise((resolve) => {
    const script = fileURLToPath(new URL(`./${part}.ts`, import.meta.url));
    const child = spawn(node, ['--no-warnings', script], { stdio: ['ignore', 'pipe', 'pipe'] });
    let said = '';
    let complained = '';
    child.stdout.on('data', (data) => {
      said += data;
    });
    child.stderr.on('data', (data) => {
      complained += data;
    });
    const limit = setTimeout(() => child.kill(), LONGEST);
    child.on('close', (code) => {
      clearTimeout(limit);
      const rows = said
        .split('\n')
        .filter((line) => line.startsWith('{"what"'))
        .map((line) => JSON.parse(line));
      const why = complained.split('\n').find((line) => /Error/.test(line)) ?? `it ended with ${code ?? 'a signal'}`;
      resolve(code === 0 ? rows : [...rows, { what: part, why }]);
    });
  });
}

const figure = (value) => (value >= 1000 ? value.toFixed(0) : value.toPrecision(3));
function cells(row) {
  if (row.why !== undefined) return [row.what, `not measured: ${row.why}`, '', '', ''];
  const spread = row.count > 1 ? ` (${figure(row.low)} to ${figure(row.high)})` : '';
  const target = row.target === undefined ? '' : `${row.atLeast ? '>=' : '<='} ${row.target} ${row.unit}`;
  const reached = row.atLeast ? row.median >= row.target : row.median <= row.target;
  return [
    row.what,
    `${figure(row.median)} ${row.unit}${spread}`,
    target,
    row.target === undefined ? '' : reached ? 'reached' : 'missed',
    row.note ?? '',
  ];
}

const asked = process.argv.slice(2).filter((word) => PARTS.includes(word));
const before = loadavg()[0];
const table = [['what', 'measured: median (spread 10 to 90 %)', 'target', 'verdict', 'note']];
for (const part of asked.length > 0 ? asked : PARTS) for (const row of await rowsOf(part)) table.push(cells(row));
const widths = table[0].map((_, column) =>
  Math.max(...table.map((row) => (row[1].startsWith('not measured') && column === 1 ? 0 : row[column].length))),
);
for (const row of table)
  console.log(
    row
      .map((cell, column) => cell.padEnd(column < 4 ? widths[column] : 0))
      .join('  ')
      .trimEnd(),
  );
console.log(
  `machine: ${cpus()[0]?.model.trim() || 'unknown processor'}, ${availableParallelism()} cores, load ${before.toFixed(1)} before and ${loadavg()[0].toFixed(1)} after; processor time but for steady states and the server`,
);
