/** Hover on a requirement: verdict, worst value, margin, and where it stands. */
import type { Requirement, RequirementResult } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { requirementText } from '../outline.ts';
import { restsOn, standing } from './rests.ts';
import { literal, paragraphs, Show } from './show.ts';
import { workingText } from './working.ts';

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

export function hoverRequirement(analysis: Analysis, requirement: Requirement): string {
  const title = `\`require ${requirementText(analysis, requirement)}\``;
  const result = resultOf(analysis, requirement);
  if (!result || !analysis.studied) return paragraphs(title, standing(analysis));
  const show = new Show(analysis.studied.circuit);
  const worst = result.worst ? `Worst: ${show.figure(result.worst.value, result.worst.dimension)}` : '';
  const facts = [worst, marginText(result, show), result.at ? `at ${result.at}` : ''].filter(Boolean).join(', ');
  return paragraphs(
    title,
    `**${VERDICT[result.verdict]}**${result.words ? `: ${literal(result.words)}` : ''}`,
    facts,
    result.worst?.working ? workingText(result.worst.working, show, '**Working**') : '',
    standing(analysis),
    restsOn(analysis),
  );
}
