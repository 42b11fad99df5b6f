/**
 * Answer files of the samples: the figures each sample gives, with step and iteration counts. A change in numbers shows as a difference to review;
 * `OILWAY_ANSWERS=write npx vitest run tests/samples` writes them anew. The figures themselves are checked against hand computation in figures.test.ts.
 */
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { type Circuit, type Study, study } from '@oilway/circuit';
import { analyse } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { describe, expect, it } from 'vitest';

const root = fileURLToPath(new URL('../../', import.meta.url));
const answers = fileURLToPath(new URL('answers/', import.meta.url));
const samples = readdirSync(`${root}samples`).filter((name) => name.endsWith('.oilway'));

/** Seven significant digits: more would differ by the machine's arithmetic. */
const rounded = (value: number | undefined): number | undefined => (value === undefined ? undefined : Number(value.toPrecision(7)));
const mapped = (values: Readonly<Record<string, number>>) =>
  Object.fromEntries(Object.entries(values).map(([key, value]) => [key, rounded(Math.abs(value) < 1e-6 ? 0 : value)]));

/** What is kept of a study: SI units, positions m, pressures Pa gauge, flows m3/s, times s. */
function figuresOf(circuit: Circuit, result: Study) {
  return {
    circuit: circuit.name,
    steps: result.steps.map((step) => ({
      id: step.id,
      time: rounded(step.time),
      speeds: Object.fromEntries(
        Object.entries(step.speeds).map(([id, s]) => [id, { low: rounded(s.low), high: rounded(s.high), direction: s.direction }]),
      ),
      peaks: mapped(step.peaks),
      points: step.points.length,
      faults: step.faults.map((fault) => fault.words),
    })),
    cycles: result.cycles.map((cycle) => ({
      id: cycle.id,
      time: rounded(cycle.time),
      runs: cycle.runs,
      settled: cycle.settled,
      statistics: cycle.run?.statistics,
    })),
    requirements: result.requirements.map((requirement) => ({ verdict: requirement.verdict, words: requirement.words })),
  };
}

/** Numbers within a relative 1e-5 (SI), everything else equal. */
function close(path: string, seen: unknown, kept: unknown, differences: string[]): void {
  if (typeof seen === 'number' && typeof kept === 'number') {
    if (Math.abs(seen - kept) > 1e-5 * Math.max(Math.abs(seen), Math.abs(kept), 1e-9)) differences.push(`${path}: ${kept} -> ${seen}`);
  } else if (typeof seen === 'object' && seen !== null && typeof kept === 'object' && kept !== null) {
    for (const key of new Set([...Object.keys(seen), ...Object.keys(kept)]))
      close(`${path}/${key}`, (seen as Record<string, unknown>)[key], (kept as Record<string, unknown>)[key], differences);
  } else if (seen !== kept) {
    differences.push(`${path}: ${JSON.stringify(kept)} -> ${JSON.stringify(seen)}`);
  }
}

describe('the samples are clean and give the figures on file', () => {
  expect(samples.length).toBeGreaterThanOrEqual(6);
  it.each(samples)('%s', (name) => {
    const text = readFileSync(`${root}samples/${name}`, 'utf8');
    const { documents } = analyse([{ uri: `file:///${name}`, text }], { study, rules: (context) => runRules(context).findings });
    const document = documents[0]!;
    expect(document.failed).toBeUndefined();
    expect(
      document.findings.filter((f) => f.severity !== 'information' && f.accepted === undefined).map((f) => `${f.code}: ${f.what}`),
    ).toEqual([]);
    const result = document.study!;
    expect(result.requirements.map((r) => r.verdict)).toEqual(result.requirements.map(() => 'met'));
    const seen = JSON.parse(JSON.stringify(figuresOf(document.circuit, result)));
    const file = `${answers}${name.replace('.oilway', '.json')}`;
    if (process.env.OILWAY_ANSWERS === 'write') writeFileSync(file, `${JSON.stringify(seen, null, 2)}\n`);
    expect(existsSync(file), `no answer file for ${name}`).toBe(true);
    const differences: string[] = [];
    close('', seen, JSON.parse(readFileSync(file, 'utf8')), differences);
    expect(differences).toEqual([]);
  });
});
