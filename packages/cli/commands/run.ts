/** `oilway run`: the cycle of one circuit as a step table with requirements and duty, or its course over time as JSON or CSV. */
import { type Exit, type Output, plural } from './outcome.ts';
import { gather } from '../files.ts';
import { open } from '../service.ts';
import type { Paint } from '../text/colour.ts';
import { courseCsv, courseData, turning } from './course.ts';
import { coilLines, cycleLines, dutyLines, headLines, requirementLines, restLines } from './steps.ts';

export interface RunOptions {
  readonly path: string;
  readonly format: 'text' | 'json' | 'csv';
  /** Only this cycle or manual function. */
  readonly cycle?: string;
  /** Longest computation of the circuit, s. */
  readonly limit?: number;
}

export async function run(options: RunOptions, output: Output, paint: Paint): Promise<Exit> {
  const gathered = await gather([options.path]);
  const refuse = (why: string): Exit => {
    output.err(`oilway: ${why}`);
    return 2;
  };
  const unusable = gathered.unusable[0];
  if (unusable !== undefined) return refuse(`${unusable.path} ${unusable.why}`);
  if (gathered.files.length > 1) return refuse(`${options.path} holds ${gathered.files.length} circuits: name one file to run`);
  const { opened, failures } = open(gathered.files, options.limit);
  for (const failure of failures) output.err(`oilway: ${failure}`);
  if (failures.length > 0) return 2;
  const one = opened[0];
  if (one === undefined) return refuse(`${options.path} cannot be run`);
  const { circuit, study, file } = one;
  if (circuit === undefined) return refuse(`${file.path} is a shelf: it has no circuit statement, so there is nothing to run`);
  if (study === undefined) return refuse(`${file.path} could not be computed: see oilway check ${file.path}`);
  const cycles = study.cycles.filter((cycle) => options.cycle === undefined || cycle.id === options.cycle);
  if (options.cycle !== undefined && cycles.length === 0) {
    const names = study.cycles.map((cycle) => cycle.id);
    return refuse(`${file.path} has no cycle ${options.cycle}${names.length === 0 ? '' : ` (it has ${names.join(', ')})`}`);
  }
  const errors = one.findings.filter((finding) => finding.severity === 'error' && finding.accepted === undefined).length;
  if (options.format === 'csv') {
    for (const line of courseCsv(cycles, turning(circuit.components))) output.out(line);
  } else if (options.format === 'json') {
    output.out(JSON.stringify(courseData(file.path, circuit, study, cycles), null, 2));
  } else {
    const text = file.text;
    for (const line of headLines(circuit, study, paint)) output.out(line);
    for (const cycle of cycles) for (const line of cycleLines(cycle, circuit, study, paint)) output.out(line);
    for (const line of coilLines(circuit, study, paint)) output.out(line);
    for (const line of requirementLines(circuit, study, text, paint)) output.out(line);
    for (const line of dutyLines(cycles, circuit, study)) output.out(line);
    for (const line of restLines(study)) output.out(line);
  }
  if (errors > 0) output.err(`oilway: ${file.path} has ${plural(errors, 'error')}: see oilway check ${file.path}`);
  const faults = cycles.some((cycle) => cycle.faults.length > 0);
  const missed = study.requirements.some((requirement) => requirement.verdict !== 'met');
  return errors > 0 || faults || missed ? 1 : 0;
}
