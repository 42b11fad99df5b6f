/** Hover on a step or cycle: time, motions, peak pressures, what it ends by; for a cycle its time, drives and faults. */
import type { Condition, Cycle, Step, StepResult } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { actuatorAt, componentOf } from './places.ts';
import { restsOn, standing } from './rests.ts';
import { literal, list, paragraphs, Show, table } from './show.ts';
import { unitsOfActuator } from './actuator.ts';

const MOST_PEAKS = 6;

export function hoverStep(analysis: Analysis, step: Step): string {
  const title = `**${literal(step.id)}** ${step.beside ? 'meanwhile' : 'step'}${step.title ? `, ${literal(step.title)}` : ''}`;
  const { studied } = analysis;
  const result = studied?.study.steps.find((one) => one.id === step.id);
  const coils = step.actions.flatMap((action) => (action.does === 'energise' ? action.commands.map((one) => one.coil) : []));
  const live = coils.length > 0 ? `Live: ${list(coils.map(literal))}.` : 'No coil is live.';
  const ends = endsBy(analysis, step);
  if (!studied || !result) return paragraphs(title, `${live} ${ends}`, standing(analysis));
  const show = new Show(studied.circuit);
  const time =
    result.time === undefined
      ? 'The run does not reach its end.'
      : `Takes ${show.figure(result.time, 'time')}${step.atMost === undefined ? '' : ` of at most ${show.figure(step.atMost, 'time')}`}.`;
  return paragraphs(
    title,
    `${time} ${live} ${ends}`,
    motions(analysis, result, show),
    peaks(result, show),
    result.faults.map((one) => `**${literal(one.words)}**`).join('  \n'),
    standing(analysis),
    restsOn(analysis),
  );
}

function endsBy(analysis: Analysis, step: Step): string {
  const parts: string[] = [];
  if (step.until) parts.push(conditionText(analysis, step.until));
  if (step.lasts !== undefined) parts.push(`${step.until ? 'at least ' : ''}${step.lasts} s`);
  return parts.length > 0 ? `Ends by: ${parts.join(', ')}.` : '';
}

/** The condition as written. */
export function conditionText(analysis: Analysis, condition: Condition): string {
  const text = analysis.textOf(condition.origin.uri) ?? '';
  return `\`${text.slice(condition.origin.start, condition.origin.end).replace(/\s+/g, ' ')}\``;
}

function motions(analysis: Analysis, result: StepResult, show: Show): string {
  const circuit = analysis.studied?.circuit;
  if (!circuit) return '';
  const rows = Object.entries(result.speeds).flatMap(([id, speed]) => {
    const component = componentOf(circuit, id);
    if (!component) return [];
    const units = unitsOfActuator(component);
    const positions = result.points.map((point) => actuatorAt(point, id)?.position).filter((one) => one !== undefined);
    const limited = [...new Set(result.points.flatMap((point) => actuatorAt(point, id)?.limitedBy.map((one) => one.words) ?? []))];
    const first = positions[0];
    const last = positions.at(-1);
    return [
      [
        `${id} ${units.words[speed.direction + 1]}`,
        component.kind === 'motor' || first === undefined || last === undefined
          ? '—'
          : `${show.position(first, units.position)} to ${show.position(last, units.position)}`,
        show.span(speed.low, speed.high, units.speed),
        speed.mean === undefined ? '—' : show.figure(Math.abs(speed.mean), units.speed),
        limited.slice(0, 2).join(', '),
      ],
    ];
  });
  return rows.length > 0 ? table(['Motion', 'Way', 'Speed', 'Mean', 'Limited by'], rows) : 'Nothing moves.';
}

function peaks(result: StepResult, show: Show): string {
  const found = Object.entries(result.peaks)
    .sort((a, b) => b[1] - a[1])
    .slice(0, MOST_PEAKS);
  return found.length === 0
    ? ''
    : `Peak pressures: ${found.map(([net, p]) => `${literal(net)} ${show.figure(p, 'pressure')}`).join(', ')}.`;
}

export function hoverCycle(analysis: Analysis, cycle: Cycle): string {
  const title = `**${literal(cycle.id)}** ${cycle.mode === 'manual' ? 'manual function' : 'cycle'}${cycle.title ? `, ${literal(cycle.title)}` : ''}`;
  const { studied } = analysis;
  const result = studied?.study.cycles.find((one) => one.id === cycle.id);
  if (!studied || !result) return paragraphs(title, standing(analysis));
  const show = new Show(studied.circuit);
  const lines: string[] = [];
  if (result.time !== undefined)
    lines.push(
      `Takes ${show.figure(result.time, 'time')}${result.firstTime !== undefined && result.runs > 1 ? ` (first run ${show.figure(result.firstTime, 'time')})` : ''}.`,
    );
  if (!result.completed && cycle.mode === 'cycle') lines.push('The run does not reach its end.');
  if (!result.settled && result.runs > 1) lines.push(`Does not settle within ${result.runs} runs.`);
  for (const [drive, duty] of Object.entries(result.duty))
    lines.push(
      `${literal(drive)}: mean ${show.figure(duty.mean, 'power')}, rms ${show.figure(duty.rms, 'power')}, highest ${show.figure(duty.highest, 'power')}.`,
    );
  if (result.heat !== undefined) lines.push(`Heat into the oil: ${show.figure(result.heat, 'power')} on the mean.`);
  const heat = studied.study.heat[cycle.id];
  if (heat) lines.push(`Oil settles at ${show.figure(heat.temperature.value, 'temperature')}.`);
  const rows = cycle.steps.map((step) => {
    const one = studied.study.steps.find((found) => found.id === step.id);
    const peak = one ? Math.max(...Object.values(one.peaks), 0) : undefined;
    return [
      step.name,
      one?.time === undefined ? '—' : show.figure(one.time, 'time'),
      peak === undefined ? '—' : show.figure(peak, 'pressure'),
    ];
  });
  return paragraphs(
    title,
    lines.join('  \n'),
    rows.length > 0 ? table(['Step', 'Time', 'Peak pressure'], rows) : '',
    result.faults.map((one) => `**${literal(one.words)}**`).join('  \n'),
    standing(analysis),
    restsOn(analysis),
  );
}
