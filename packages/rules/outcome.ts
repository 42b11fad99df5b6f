/** What the study itself has to tell: requirements missed or undecided, faults of a run, components that are not computed. */
import type { Component, Fault, Origin, RequirementResult, Requirement } from '@oilway/circuit';
import type { Finding, RuleContext } from './rule.ts';

const placeOf = (requirement: Requirement | undefined): string =>
  requirement === undefined || requirement.form === 'never'
    ? ''
    : requirement.form === 'bound' && requirement.port !== undefined
      ? `${requirement.of}.${requirement.port}`
      : requirement.of;

const plain = { related: [], fixes: [] } as const;

function ofRequirement(context: RuleContext, result: RequirementResult): Finding[] {
  if (result.verdict === 'met') return [];
  const requirement = context.circuit.requirements.find((one) => one.id === result.id);
  const undecided = result.verdict === 'undecidable';
  return [
    {
      ...plain,
      code: 'REQUIREMENT',
      severity: 'error',
      what: `Requirement ${undecided ? '' : 'missed: '}${result.words}`,
      ...(undecided ? { why: 'What cannot be decided counts as failed, never as passed.' } : {}),
      origin: result.origin,
      // Two requirements on one component stay two findings.
      place: [placeOf(requirement), result.id].filter((part) => part !== '').join(' '),
      computed: true,
    },
  ];
}

/** Faults with which the run goes on and gives its figures. */
const MILD: readonly Fault['kind'][] = ['first run short of oil', 'does not settle', 'interlock'];

/**
 * A fault that a rule has told already, for the same step, is not told twice. Beside other errors, or with parts of the circuit unknown, it
 * follows from them as likely as not: then it is for information.
 */
function ofFault(fault: Fault, cycle: string, told: readonly Finding[], incomplete: boolean): Finding[] {
  const at = fault.step ?? cycle;
  if (told.some((finding) => finding.state === at && finding.severity !== 'information')) return [];
  const follows = incomplete || told.some((finding) => finding.severity === 'error');
  return [
    {
      ...plain,
      code: 'CYCLE',
      severity: follows ? 'information' : MILD.includes(fault.kind) ? 'warning' : 'error',
      what: fault.words,
      ...(follows ? { why: 'It may follow from the other errors of this circuit.' } : {}),
      origin: fault.origin,
      place: at,
      state: at,
      computed: true,
    },
  ];
}

function notComputed(of: string, why: string, origin: Origin): Finding {
  return {
    ...plain,
    code: 'NOT-COMPUTED',
    severity: 'information',
    what: `${of} is not computed: ${why}`,
    origin,
    place: of,
    computed: true,
  };
}

/** States and steps of which a solution was not found: they are not clean, they are not known. */
function unsolved({ circuit, study }: RuleContext): Finding[] {
  const places = [
    ...(study?.states ?? []).map((one) => ({ id: one.id, points: one.variants.map((variant) => variant.point) })),
    ...(study?.steps ?? []),
  ];
  const steps = circuit.cycles.flatMap((cycle) => cycle.steps);
  const usual = circuit.components.find((one) => one.kind === 'pump') ?? circuit.components[0];
  return places.flatMap(({ id, points }): Finding[] => {
    const failed = points.filter((one) => !one.solved);
    const origin = steps.find((one) => one.id === id)?.origin ?? usual?.nameOrigin;
    if (failed.length === 0 || origin === undefined) return [];
    const why = failed.flatMap((one) => one.diagnosis).find((one) => one.kind === 'NO EQUILIBRIUM');
    const what = `No solution was found in ${failed.length} of ${points.length} cases of ${id}; what is said of it rests on the others`;
    return [
      {
        ...plain,
        code: 'NOT-COMPUTED',
        severity: 'warning',
        what,
        ...(why?.kind === 'NO EQUILIBRIUM' ? { why: why.why } : {}),
        origin,
        place: id,
        state: id,
        computed: true,
      },
    ];
  });
}

/** Findings of the study and of what it leaves out; `told` are those of the rules. */
export function outcome(context: RuleContext, told: readonly Finding[]): readonly Finding[] {
  const { circuit, study } = context;
  if (study === undefined) return [];
  const components = new Map<string, Component>(circuit.components.map((one) => [one.id, one]));
  // An unknown component has its error already, at the setting that is missing.
  const left = Object.entries(study.notComputed).flatMap(([id, why]) => {
    const component = components.get(id);
    return component === undefined || circuit.unknown[id] !== undefined ? [] : [notComputed(id, why, component.nameOrigin)];
  });
  const incomplete = Object.keys(circuit.unknown).length > 0;
  const faults = study.cycles.flatMap((cycle) => cycle.faults.flatMap((fault) => ofFault(fault, cycle.id, told, incomplete)));
  return [...left, ...unsolved(context), ...faults, ...study.requirements.flatMap((one) => ofRequirement(context, one))];
}
