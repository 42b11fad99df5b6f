/** The real command as a child process on real files: streams, exit status, shapes. */
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const COMMAND = join(ROOT, 'packages/cli/bin/oilway.mjs');
const sample = (name: string) => readFileSync(join(ROOT, 'samples', name), 'utf8');

/** A pump whose relief stands beside the line. */
const NO_RELIEF = sample('01-table.oilway').replace(/^working pressure: P1 to RV1, /m, 'working pressure: P1 to ');

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'oilway-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function oilway(args: readonly string[], cwd = folder) {
  const environment = { ...process.env };
  delete environment.NO_COLOR;
  delete environment.FORCE_COLOR;
  const child = spawnSync(process.execPath, [COMMAND, ...args], { cwd, encoding: 'utf8', env: environment, maxBuffer: 64 * 1024 * 1024 });
  expect(child.stderr).not.toContain('internal error');
  return { status: child.status, out: child.stdout, err: child.stderr };
}

function write(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  mkdirSync(join(path, '..'), { recursive: true });
  writeFileSync(path, content);
  return path;
}

describe('check', () => {
  it('finds nothing grave in the samples', () => {
    const { status, out, err } = oilway(['check', join(ROOT, 'samples', '01-table.oilway')]);
    expect(err).toBe('');
    expect(status, out).toBe(0);
    expect(out).toMatch(/^1 circuit: /m);
  });
  it('shows a finding with its place, its line and a mark under the characters', () => {
    write('faulty/no-relief.oilway', NO_RELIEF);
    const { status, out } = oilway(['check', 'faulty/no-relief.oilway']);
    expect(status).toBe(1);
    expect(out).toMatch(/^faulty\/no-relief\.oilway:\d+:\d+: error A01: /m);
    const lines = out.split('\n');
    const at = lines.findIndex((line) => line.includes('error A01'));
    expect(lines[at + 1]).toMatch(/^ *\d+ \| /);
    expect(lines[at + 2]).toMatch(/^ *\| +\^+$/);
    expect(out).toContain('why:');
    expect(out).toContain('mend:');
  });
  it('goes on past a broken line and says what is wrong there', () => {
    write(
      'broken.oilway',
      sample('01-table.oilway')
        .replace(/volume \d+ L/, 'volume 80 litter')
        .replace('drive     M1 (power', 'drive     M1 (power (('),
    );
    const { status, out } = oilway(['check', 'broken.oilway']);
    expect(status).toBe(1);
    expect(out).toMatch(/^broken\.oilway:6:\d+: error /m);
    expect(out).toMatch(/^broken\.oilway:7:\d+: error /m);
  });
  it('writes JSON that says the same', () => {
    write('faulty/no-relief.oilway', NO_RELIEF);
    const text = oilway(['check', 'faulty/no-relief.oilway']).out;
    const { status, out } = oilway(['check', '--format', 'json', 'faulty/no-relief.oilway']);
    expect(status).toBe(1);
    const data = JSON.parse(out);
    expect(data).toMatchObject({ tool: 'oilway', cannotRead: [], totals: { files: 1 } });
    const findings = data.files[0].findings.filter((one: { accepted: string | null }) => one.accepted === null);
    expect(findings.length).toBe(data.totals.errors + data.totals.warnings + data.totals.information);
    for (const one of findings) {
      expect(text).toContain(`${one.file}:${one.line}:${one.column}: ${one.severity} ${one.code}: ${one.what}`);
      expect(one.endLine).toBeGreaterThanOrEqual(one.line);
    }
    expect(findings.some((one: { code: string }) => one.code === 'A01')).toBe(true);
  });
  it('searches folders downwards, in order, and leaves hidden ones alone', () => {
    for (const name of ['tree/b.oilway', 'tree/a/one.oilway', 'tree/.hidden/x.oilway', 'tree/node_modules/y.oilway'])
      write(name, sample('01-table.oilway'));
    const data = JSON.parse(oilway(['check', '--format', 'json', 'tree']).out);
    expect(data.files.map((one: { file: string }) => one.file)).toEqual([join('tree', 'a', 'one.oilway'), join('tree', 'b.oilway')]);
    const here = JSON.parse(oilway(['check', '--format', 'json'], join(folder, 'tree')).out);
    expect(here.totals.files).toBe(2);
  });
  it('hides what an allow statement accepts, counts it, and shows it when asked', () => {
    write('allowed.oilway', `${NO_RELIEF}\nallow A01 on P1 "a bench with its relief in the hose reel"\n`);
    const { out } = oilway(['check', 'allowed.oilway']);
    expect(out).not.toContain('error A01');
    expect(out).toMatch(/1 accepted by allow/);
    const all = oilway(['check', '--accepted', 'allowed.oilway']).out;
    expect(all).toContain('error A01');
    expect(all).toContain('accepted: a bench with its relief in the hose reel');
    const [file] = JSON.parse(oilway(['check', '--format', 'json', 'allowed.oilway']).out).files;
    expect(file.findings.find((one: { code: string }) => one.code === 'A01').accepted).toContain('hose reel');
  });
  it('uses no colours in a pipe', () => {
    write('plain.oilway', NO_RELIEF);
    expect(oilway(['check', 'plain.oilway']).out).not.toContain('\u001b');
  });
});

describe('what cannot be read', () => {
  const refused = (args: readonly string[], words: RegExp) => {
    const { status, out, err } = oilway(args);
    expect(status).toBe(2);
    expect(out).toBe('');
    expect(err.trimEnd().split('\n')).toHaveLength(1);
    expect(err).toMatch(words);
  };
  it('a file that is not there', () => refused(['check', 'nowhere.oilway'], /^oilway: nowhere\.oilway does not exist/));
  it('a folder without circuits', () => {
    write('empty/readme.txt', 'nothing');
    refused(['check', 'empty'], /^oilway: empty holds no circuit/);
  });
  it('a file over 2 MB', () => {
    write('large.oilway', 'x'.repeat(2 * 1024 * 1024 + 1));
    refused(['check', 'large.oilway'], /too large/);
  });
  it('a binary file', () => {
    write('binary.oilway', new Uint8Array([0x50, 0, 1, 2]));
    refused(['check', 'binary.oilway'], /NUL/);
  });
  it('a file that is not UTF-8', () => {
    write('latin.oilway', new Uint8Array([0x22, 0xe4, 0x22]));
    refused(['check', 'latin.oilway'], /not UTF-8/);
  });
  it('a link that leads back to itself', () => {
    symlinkSync('loop.oilway', join(folder, 'loop.oilway'));
    refused(['check', 'loop.oilway'], /leads back to itself/);
  });
  it('a missing file beside a good one: the good one is checked, the failure is not lost', () => {
    write('good.oilway', sample('01-table.oilway'));
    const { status, out, err } = oilway(['check', 'good.oilway', 'nowhere.oilway']);
    expect(status).toBe(2);
    expect(out).toContain('1 circuit:');
    expect(err).toContain('nowhere.oilway');
  });
  it('JSON says it too, so that a failed run never reads as clean', () => {
    const { status, out } = oilway(['check', '--format', 'json', 'nowhere.oilway']);
    expect(status).toBe(2);
    expect(JSON.parse(out)).toMatchObject({ files: [], cannotRead: [{ file: 'nowhere.oilway', why: 'does not exist' }] });
  });
  it('run refuses the same ways, and a folder of several circuits', () => {
    refused(['run', 'nowhere.oilway'], /does not exist/);
    refused(['run', 'tree'], /holds 2 circuits/);
    refused(['run'], /takes one file/);
    refused(['run', '--cycle', 'Nothing', 'good.oilway'], /has no cycle Nothing \(it has Sand\)/);
  });
});

describe('run', () => {
  const path = join(ROOT, 'samples', '01-table.oilway');
  it('prints the step table, the requirements and the duty', () => {
    const { status, out, err } = oilway(['run', path]);
    expect(err).toBe('');
    expect(status, out).toBe(0);
    expect(out).toMatch(/^cycle Sand: \d/m);
    expect(out).toMatch(/^step +entered +time +motion +speed +force +peak pressure +limited by$/m);
    expect(out).toMatch(/^Right +0\.00 s +\d+\.\d+ s +C1 extends +\d/m);
    expect(out).toMatch(/^Left .*C1 retracts/m);
    expect(out).toMatch(/^requirements: 4 of 4 met$/m);
    expect(out).toMatch(/^ {2}Sand: M1 rms /m);
    expect(out).not.toMatch(/NaN|undefined|Infinity/);
  });
  it('gives the course as CSV: equal columns, times that never go back, SI', () => {
    const { status, out } = oilway(['run', '--format', 'csv', path]);
    expect(status).toBe(0);
    const [head = '', ...rows] = out.trimEnd().split('\n');
    const names = head.split(',');
    expect(names.slice(0, 3)).toEqual(['cycle', 'step', 'time [s]']);
    expect(names).toContain('C1 position [m]');
    expect(names).toContain('C1 velocity [m/s]');
    expect(rows.length).toBeGreaterThan(10);
    let last = 0;
    let farthest = 0;
    for (const row of rows) {
      const cells = row.split(',');
      expect(cells.length).toBe(names.length);
      expect(Number(cells[2])).toBeGreaterThanOrEqual(last);
      last = Number(cells[2]);
      farthest = Math.max(farthest, Number(cells[names.indexOf('C1 position [m]')]));
    }
    // The table's stroke is 0.8 m and the switch stands at 0.77 m.
    expect(farthest).toBeGreaterThan(0.769);
    expect(farthest).toBeLessThanOrEqual(0.8001);
  });
  it('gives the course as JSON: columns as long as the times, requirements with verdicts', () => {
    const { status, out } = oilway(['run', '--format', 'json', path]);
    expect(status).toBe(0);
    const data = JSON.parse(out);
    expect(data.circuit).toBe('SandingTable');
    const [cycle] = data.cycles;
    expect(cycle.id).toBe('Sand');
    for (const column of cycle.columns) expect(column.values.length, column.name).toBe(cycle.times.length);
    expect(data.requirements.map((one: { verdict: string }) => one.verdict)).toEqual(['met', 'met', 'met', 'met']);
  });
  it('says a missed requirement by its exit status', () => {
    write('missed.oilway', sample('01-table.oilway').replace('between 150 mm/s and 190 mm/s', 'between 1 mm/s and 2 mm/s'));
    const { status, out } = oilway(['run', 'missed.oilway']);
    expect(status).toBe(1);
    expect(out).toMatch(/^missed +C1 speed .*2\.00 mm\/s/m);
    expect(oilway(['check', 'missed.oilway']).status).toBe(1);
  });
  it('answers in US units where the circuit does', () => {
    const { out } = oilway(['run', join(ROOT, 'samples', '06-press.oilway')]);
    const [figures = ''] = out.split('assumed, as not declared');
    expect(figures).toContain(' psi');
    expect(figures).toContain(' hp');
    expect(figures).not.toMatch(/\d (bar|kW|mm|L\/min)/);
  });
});

describe('a computation that takes too long', () => {
  it('is cut off, said, and never reads as clean', () => {
    const { status, out, err } = oilway(['check', '--limit', '0.000001', join(ROOT, 'samples', '01-table.oilway')]);
    expect(status).toBe(2);
    expect(err).toMatch(/^oilway: SandingTable is not computed within 0\.000001 s: figures and findings are missing/);
    expect(out).toContain('1 circuit, not fully computed: ');
  });
});

describe('Node 20', () => {
  it('is enough: the command brings what that lacks', () => {
    const older = 'data:text/javascript,delete Object.groupBy;delete Map.groupBy;delete Promise.withResolvers;delete Array.fromAsync;';
    const path = join(ROOT, 'samples', '01-table.oilway');
    const child = spawnSync(process.execPath, ['--import', older, COMMAND, 'check', path], { encoding: 'utf8' });
    expect(child.stdout + child.stderr).toMatch(/^1 circuit: /);
  });
});

describe('what rests on something missing', () => {
  it('is marked, not guessed', () => {
    write('unknown.oilway', sample('01-table.oilway').replace(', passes 40 L/min at 4 bar', ''));
    const { status, out } = oilway(['run', 'unknown.oilway']);
    expect(status).toBe(1);
    expect(out).toMatch(/not computed.*V1 has no `passes`/);
    expect(out).toMatch(/not decided/);
    expect(out).not.toMatch(/NaN|undefined/);
  });
});

describe('explain, help, version, mistakes', () => {
  it('prints the page of a rule, whatever the case', () => {
    const { status, out } = oilway(['explain', 'a01']);
    expect(status).toBe(0);
    expect(out).toMatch(/^A01 /);
    expect(out).toMatch(/Published ground: \w/);
    expect(out).toMatch(/Mend: \w/);
    expect(out).toContain('How it is decided');
  });
  it('lists all rules without a code', () => {
    const rules = readdirSync(join(ROOT, 'packages/rules/rules')).filter((name) => /^[A-Z]\d\d-/.test(name));
    const { status, out } = oilway(['explain']);
    expect(status).toBe(0);
    for (const name of rules) expect(out, name).toMatch(new RegExp(`^${name.slice(0, 3)} `, 'm'));
  });
  it('explains a word of the notation from the tables: ports and settings', () => {
    const { status, out } = oilway(['explain', 'Cylinder']);
    expect(status).toBe(0);
    expect(out).toMatch(/^cylinder: cylinder/);
    expect(out).toMatch(/^bore +bore 63 mm +required/m);
    expect(out).toMatch(/^rod +working/m);
    expect(oilway(['explain', 'load']).out).toMatch(/^inward +inward 12 kN/m);
  });

  it('explains every code that the notation itself gives', () => {
    const folder = join(ROOT, 'packages/language');
    const sources = ['parse', 'resolve'].flatMap((part) =>
      readdirSync(join(folder, part)).map((name) => readFileSync(join(folder, part, name), 'utf8')),
    );
    const codes = new Set(sources.flatMap((source) => [...source.matchAll(/code: '([A-Z]+)'/g)].map(([, code = '']) => code)));
    expect(codes.size).toBeGreaterThan(3);
    const { out } = oilway(['explain']);
    for (const code of codes) expect(out, code).toMatch(new RegExp(`^${code} `, 'm'));
  });
  it('says that there is no such code', () => {
    const { status, err } = oilway(['explain', 'Q99']);
    expect(status).toBe(2);
    expect(err).toContain('there is no code Q99');
  });
  it('helps with examples', () => {
    const { status, out } = oilway(['--help']);
    expect(status).toBe(0);
    for (const word of ['oilway check', 'oilway run', 'oilway explain', 'Examples', 'exit status']) expect(out).toContain(word);
  });
  it('says its version', () => {
    const about = JSON.parse(readFileSync(join(ROOT, 'packages/cli/package.json'), 'utf8'));
    expect(oilway(['--version']).out.trim()).toBe(about.version);
  });
  it.each([
    [[], /no command/],
    [['mend'], /there is no command mend/],
    [['check', '--format', 'xml'], /check has no format xml/],
    [['check', '--cycle', 'A'], /check does not take --cycle/],
    [['check', '--colour'], /--colour/],
    [['check', '--limit', 'soon'], /--limit takes seconds, not soon/],
    [['explain', 'A01', 'A02'], /takes one code or word/],
  ])('%j is refused in one line', (args, words) => {
    const { status, err } = oilway(args);
    expect(status).toBe(2);
    expect(err).toMatch(words);
    expect(err.trimEnd().split('\n')).toHaveLength(1);
  });
});
