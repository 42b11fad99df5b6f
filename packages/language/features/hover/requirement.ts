/** Hover on a requirement: verdict, worst value, margin, and where it stands. */
import type { Point, Requirement, RequirementResult, Working } from '@oilway/circuit';
import type { Analysis, Studied } from '../analysis.ts';
import { requirementText } from '../outline.ts';
import { restsOn, standing } from './rests.ts';
import { literal, paragraphs, Show } from './show.ts';
import { actuatorAt, placesOf } from './places.ts';
import { shaftWorking } from './supply-working.ts';
import { forceWorking, speedWorking, torqueWorking, workingText } from './working.ts';

const VERDICT = { met: 'Met', missed: 'Missed', undecidable: 'Cannot be decided' } as const;

/** The result that belongs to a requirement of the text as it stands: by its id, where the study has the same requirement. */
export function resultOf(analysis: Analysis, requirement: Requirement): RequirementResult | undefined {
  const { studied } = analysis;
  if (!studied) return undefined;
  const same = studied.circuit.requirements.find((one) => one.id === requirement.id);
  return same && same.form === requirement.form ? studied.study.requirements.find((one) => one.id === requirement.id) : undefined;
}

export function marginText(result: RequirementResult, show: Show): string {
  if (result.margin === undefined) return '';
  return `${result.margin >= 0 ? 'margin' : 'short by'} ${show.figure(Math.abs(result.margin), 'ratio')}`;
}

/** The working at the steady point where the worst value stands; undefined where it stands in the run between them. */
function workingAtWorst(studied: Studied, requirement: Requirement, result: RequirementResult): Working | undefined {
  if (requirement.form !== 'bound' || !result.worst) return undefined;
  const { of, measure } = requirement;
  const worst = Math.abs(result.worst.value);
  const points = placesOf(studied).flatMap((place) => place.points);
  const at = (value: (point: Point) => number | undefined): Point | undefined =>
    points.find((point) => Math.abs(Math.abs(value(point) ?? Number.POSITIVE_INFINITY) - worst) <= 1e-6 * worst);
  const point =
    measure === 'speed'
      ? at((one) => actuatorAt(one, of)?.velocity)
      : measure === 'force' || measure === 'torque'
        ? at((one) => actuatorAt(one, of)?.force)
        : measure === 'power'
          ? at((one) => one.power[of])
          : undefined;
  if (!point) return undefined;
  if (measure === 'speed') return speedWorking(studied.circuit, of, point);
  if (measure === 'power') return shaftWorking(studied.circuit, of, point);
  return forceWorking(studied.circuit, of, point) ?? torqueWorking(studied.circuit, of, point);
}

export function hoverRequirement(analysis: Analysis, requirement: Requirement): string {
  const title = `\`require ${requirementText(analysis, requirement)}\``;
  const result = resultOf(analysis, requirement);
  if (!result || !analysis.studied) return paragraphs(title, standing(analysis));
  const show = new Show(analysis.studied.circuit);
  const worst = result.worst ? `Worst: ${show.figure(result.worst.value, result.worst.dimension)}` : '';
  const facts = [worst, marginText(result, show), result.at ? `at ${result.at}` : ''].filter(Boolean).join(', ');
  const working = result.worst?.working ?? workingAtWorst(analysis.studied, requirement, result);
  return paragraphs(
    title,
    `**${VERDICT[result.verdict]}**${result.words ? `: ${literal(result.words)}` : ''}`,
    facts,
    working ? workingText(working, show, '**Working**') : '',
    standing(analysis),
    restsOn(analysis),
  );
}
