/** The step table and what belongs to it: requirements, duty, heat, states, assumptions. */
import { type Dimension, type FormatOptions, format, formatAgainst } from '@oilway/quantity';
import type { ActuatorPoint, Circuit, CycleResult, Requirement, Study, StepResult } from '@oilway/circuit';
import type { Paint } from '../text/colour.ts';
import { table } from '../text/table.ts';
import { turning } from './course.ts';
import { plural } from './outcome.ts';

type Show = (si: number, dimension: Dimension, options?: FormatOptions) => string;

function shower(circuit: Circuit): Show {
  return (si, dimension, options = {}) => format(si, dimension, { display: circuit.display, units: circuit.units, ...options });
}

export function headLines(circuit: Circuit, study: Study, paint: Paint): string[] {
  const head = paint.strong(`${circuit.name ?? 'circuit'}${circuit.title === undefined ? '' : `  ${circuit.title}`}`);
  const byReason = new Map<string, string[]>();
  for (const [of, reason] of Object.entries(study.notComputed)) byReason.set(reason, [...(byReason.get(reason) ?? []), of]);
  return [head, ...[...byReason].map(([reason, places]) => `  not computed (${reason}): ${places.join(', ')}`)];
}

/** `4.00 .. 12.0 mm/s`, or one figure where both are shown alike. */
function span(low: number, high: number, dimension: Dimension, show: Show): string {
  const a = show(low, dimension);
  const b = show(high, dimension);
  if (a === b) return a;
  const unit = b.slice(b.indexOf(' '));
  return a.endsWith(unit) ? `${a.slice(0, a.length - unit.length)} .. ${b}` : `${a} .. ${b}`;
}

interface Row {
  readonly id: string;
  readonly motion: string;
  readonly speed: string;
  readonly force: string;
  readonly limits: string;
}

/** Limits named in a row of the step table. */
const LIMITERS_SHOWN = 3;

function limitsOf(points: readonly ActuatorPoint[]): string {
  const words = [...new Set(points.flatMap((point) => point.limitedBy.map((limiter) => limiter.words)))];
  // The strongest come first; a row stays readable, and the JSON has them all.
  const more = words.length - LIMITERS_SHOWN;
  return [...words.slice(0, LIMITERS_SHOWN), ...(more > 0 ? [`and ${more} more`] : [])].join('; ');
}

/** What one actuator does in a step: nothing where it neither moves nor is pushed. */
function actuatorRow(id: string, step: StepResult, turns: boolean, show: Show): Row | undefined {
  const points = step.points.flatMap((point) => point.actuators.filter((one) => one.id === id));
  const speed = step.speeds[id];
  const pushed = points.filter((point) => point.direction !== 0);
  if (speed === undefined && pushed.length === 0) return undefined;
  const direction = speed?.direction ?? pushed[0]?.direction ?? 1;
  const stalled = speed === undefined;
  const atStop = pushed.some((point) => point.atStop !== undefined);
  const verb = turns ? (direction > 0 ? 'forward' : 'backward') : direction > 0 ? 'extends' : 'retracts';
  const forces = (pushed.length > 0 ? pushed : points).map((point) => point.force * direction);
  const force = turns ? 'torque' : 'force';
  const short = pushed.find((point) => point.shortBy !== undefined);
  return {
    id,
    motion: stalled ? (atStop ? `${verb}: at its stop` : `${verb}: stands`) : verb,
    speed:
      speed === undefined
        ? ''
        : span(Math.min(speed.low, speed.high), Math.max(speed.low, speed.high), turns ? 'rotation' : 'velocity', show),
    force: forces.length === 0 ? '' : span(Math.min(...forces), Math.max(...forces), force, show),
    limits: [short?.shortBy === undefined ? '' : `short by ${show(short.shortBy, force)}`, limitsOf(pushed.length > 0 ? pushed : points)]
      .filter((part) => part !== '')
      .join('; '),
  };
}

function peakOf(step: StepResult, unknown: Readonly<Record<string, string>>, show: Show): string {
  let best: readonly [string, number] | undefined;
  for (const [net, value] of Object.entries(step.peaks))
    if (unknown[net] === undefined && (best === undefined || value > best[1])) best = [net, value];
  return best === undefined ? '' : `${show(best[1], 'pressure')} ${best[0]}`;
}

/** One line a step and moving actuator. */
function stepRows(steps: readonly StepResult[], cycle: string, circuit: Circuit, study: Study, show: Show): string[][] {
  const turns = turning(circuit.components);
  const named = (step: StepResult) => [
    ...step.points.flatMap((point) => point.actuators.map((one) => one.id)),
    ...Object.keys(step.speeds),
  ];
  const ids = [...new Set(steps.flatMap(named))];
  const rows: string[][] = [];
  for (const step of steps) {
    const moving = ids.flatMap((id) => actuatorRow(id, step, turns(id), show) ?? []);
    const first = [
      step.id.startsWith(`${cycle}.`) ? step.id.slice(cycle.length + 1) : step.id,
      step.entered === undefined ? '' : show(step.entered, 'time'),
      step.time !== undefined ? show(step.time, 'time') : cycle === '' ? '' : step.entered === undefined ? 'not reached' : 'does not end',
    ];
    const list: readonly Partial<Row>[] = moving.length === 0 ? [{}] : moving;
    const [unknown] = step.points.flatMap((point) => Object.values(point.notComputed));
    const nothing = unknown === undefined ? 'nothing moves' : `not computed: ${unknown}`;
    list.forEach((row, i) => {
      const motion = row.id === undefined ? nothing : `${row.id} ${row.motion}`;
      rows.push([
        ...(i === 0 ? first : ['', '', '']),
        motion,
        row.speed ?? '',
        row.force ?? '',
        i === 0 ? peakOf(step, study.notComputed, show) : '',
        row.limits ?? '',
      ]);
    });
  }
  return rows;
}

const STEP_COLUMNS = [
  { title: 'step' },
  { title: 'entered', align: 'right' as const },
  { title: 'time', align: 'right' as const },
  { title: 'motion' },
  { title: 'speed', align: 'right' as const },
  { title: 'force', align: 'right' as const },
  { title: 'peak pressure' },
  { title: 'limited by' },
];

/** Where no cycle is declared: what each coil does alone. */
export function coilLines(circuit: Circuit, study: Study, paint: Paint): string[] {
  const steps = study.steps.filter((step) => step.cycle === '');
  if (steps.length === 0) return [];
  return [
    '',
    paint.strong('each coil alone (no cycle is declared)'),
    ...table(STEP_COLUMNS, stepRows(steps, '', circuit, study, shower(circuit)), paint.strong),
  ];
}

export function cycleLines(cycle: CycleResult, circuit: Circuit, study: Study, paint: Paint): string[] {
  const show = shower(circuit);
  const steps = study.steps.filter((step) => step.cycle === cycle.id);
  const rows = stepRows(steps, cycle.id, circuit, study, show);
  const time = cycle.time === undefined ? 'does not end' : show(cycle.time, 'time');
  const first =
    cycle.firstTime !== undefined && cycle.time !== undefined && show(cycle.firstTime, 'time') !== time
      ? `, first run ${show(cycle.firstTime, 'time')}`
      : '';
  const settled = cycle.runs > 1 ? `, ${cycle.settled ? 'settled after' : 'not settled after'} ${plural(cycle.runs, 'run')}` : '';
  const faults = cycle.faults.map((fault) => paint.error(`  fault: ${fault.words}`));
  return ['', paint.strong(`${cycle.mode} ${cycle.id}: ${time}${first}${settled}`), ...table(STEP_COLUMNS, rows, paint.strong), ...faults];
}

function boundOf(requirement: Requirement): { readonly value: number; readonly dimension: Dimension; readonly words: string } | undefined {
  if (requirement.form !== 'bound') return undefined;
  const { bound } = requirement;
  if (bound.is === 'between') return { value: bound.low.si, dimension: bound.low.dimension, words: 'between' };
  return { value: bound.value.si, dimension: bound.value.dimension, words: bound.is === 'reaches' ? 'reaches' : `at ${bound.is}` };
}

export function requirementLines(circuit: Circuit, study: Study, text: string, paint: Paint): string[] {
  if (study.requirements.length === 0) return [];
  const show = shower(circuit);
  const options = { display: circuit.display, units: circuit.units };
  const rows = study.requirements.map((result) => {
    const requirement = circuit.requirements.find((one) => one.id === result.id);
    const written = result.origin.uri === circuit.uri ? text.slice(result.origin.start, result.origin.end).replace(/\s+/g, ' ') : result.id;
    const bound = requirement === undefined ? undefined : boundOf(requirement);
    let worst = '';
    let limit = '';
    if (requirement?.form === 'bound' && requirement.bound.is === 'between') {
      limit = `${show(requirement.bound.low.si, requirement.bound.low.dimension)} to ${show(requirement.bound.high.si, requirement.bound.high.dimension)}`;
      if (result.worst !== undefined) worst = show(result.worst.value, result.worst.dimension, { unit: requirement.bound.low.unit });
    } else if (bound !== undefined) {
      const unit = requirement?.form === 'bound' && 'value' in requirement.bound ? requirement.bound.value.unit : '';
      const pair =
        result.worst === undefined ? undefined : formatAgainst(result.worst.value, bound.value, bound.dimension, { ...options, unit });
      worst = pair?.value ?? '';
      limit = `${bound.words} ${pair?.bound ?? format(bound.value, bound.dimension, { ...options, unit })}`;
    }
    const margin = result.margin === undefined || !Number.isFinite(result.margin) ? '' : `${format(result.margin, 'ratio', { digits: 2 })}`;
    return [
      result.verdict === 'undecidable' ? 'not decided' : result.verdict,
      written.replace(/^require /, ''),
      worst,
      limit,
      margin,
      result.at,
      result.verdict === 'met' ? '' : result.words,
    ];
  });
  const columns = [
    { title: 'verdict' },
    { title: 'requirement' },
    { title: 'worst', align: 'right' as const },
    { title: 'bound' },
    { title: 'margin', align: 'right' as const },
    { title: 'where' },
    { title: 'remark' },
  ];
  const lines = table(columns, rows);
  const coloured = lines.map((line, i) => {
    if (i === 0) return paint.strong(line);
    const verdict = study.requirements[i - 2]?.verdict;
    return verdict === undefined
      ? line
      : verdict === 'met'
        ? line.replace('met', paint.good('met'))
        : line.replace(/^\S+( decided)?/, (word) => paint.error(word));
  });
  const met = study.requirements.filter((one) => one.verdict === 'met').length;
  return ['', paint.strong(`requirements: ${met} of ${study.requirements.length} met`), ...coloured];
}

export function dutyLines(cycles: readonly CycleResult[], circuit: Circuit, study: Study): string[] {
  const show = shower(circuit);
  const lines: string[] = [];
  for (const cycle of cycles) {
    for (const [drive, duty] of Object.entries(cycle.duty)) {
      lines.push(
        `  ${cycle.id}: ${drive} rms ${show(duty.rms, 'power')}, highest ${show(duty.highest, 'power')}, mean ${show(duty.mean, 'power')}`,
      );
    }
    const heat = cycle.heat === undefined ? [] : [`heat into the oil ${show(cycle.heat, 'power')}`];
    const work = cycle.work === undefined ? [] : [`work given to the loads ${show(cycle.work, 'power')}`];
    if (heat.length + work.length > 0) lines.push(`  ${cycle.id}: ${[...heat, ...work].join(', ')}`);
  }
  const reservoirs = circuit.components.filter((one) => one.kind === 'reservoir').map((one) => one.id);
  for (const [of, balance] of Object.entries(study.heat)) {
    // With one reservoir its balance is the circuit's.
    if (reservoirs.length === 1 && reservoirs.some((id) => of.endsWith(` ${id}`) && study.heat[of.slice(0, -id.length - 1)] !== undefined))
      continue;
    lines.push(
      `  ${of}: oil settles at ${show(balance.temperature.value, balance.temperature.dimension)} with ${show(balance.heat, 'power')} of heat`,
    );
  }
  return lines.length === 0 ? [] : ['', 'duty', ...lines];
}

/** Motions in machine states that nobody asked for, and what was assumed. */
export function restLines(study: Study): string[] {
  const lines: string[] = [];
  const moves = new Map<string, { first: string; states: Set<string> }>();
  for (const state of study.states) {
    if (state.state === 'COIL' || state.state === 'MANUAL') continue;
    for (const variant of state.variants) {
      for (const motion of variant.moving) {
        if (motion.relaxes !== undefined) continue;
        const way = `${motion.id} moves by ${motion.path}`;
        const known = moves.get(way) ?? { first: variant.label, states: new Set() };
        moves.set(way, { ...known, states: known.states.add(state.id) });
      }
    }
  }
  if (moves.size > 0) lines.push('', 'moves without a step');
  for (const [way, { first, states }] of moves) lines.push(`  ${way}: in ${[...states].join(', ')} (first: ${first})`);
  if (study.assumptions.length > 0) {
    lines.push('', 'assumed, as not declared');
    for (const one of study.assumptions) lines.push(`  ${`${one.component} ${one.property}`.trim()}: ${one.value} (${one.source})`);
  }
  return lines;
}
