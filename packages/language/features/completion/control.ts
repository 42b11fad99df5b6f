/** Proposals in the lines that control: steps, while lines, interlocks, emergency, requirements. */
import { CompletionItemKind } from 'vscode-languageserver-types';
import type { Dimension } from '@oilway/quantity';
import type { Circuit, Measure } from '@oilway/circuit';
import { measureOf, MEASURES, measuresOf, type Subject } from '../../resolve/measures.ts';
import type { Token } from '../text/scan.ts';
import { word, type Proposal } from './item.ts';
import { coils, components, conditionNames, constants, cycles, places, STATES, steps } from './names.ts';

/** What each measure is of, in words; its dimension follows from the subject. */
const MEASURE_ABOUT: Readonly<Record<Measure, string>> = {
  speed: 'in its direction of motion',
  force: 'pressed on the load',
  torque: 'at the gear output',
  pressure: 'gauge',
  power: 'of a drive, pump or actuator; loss of a valve or line',
  loading: 'of a drive, over the cycle',
  flow: 'through it',
  loss: 'pressure drop across it',
  temperature: 'of the oil',
  time: 'of the cycle or step',
  position: 'from retracted',
  volume: 'of oil in it',
  drift: 'moved by leakage; needs `for`',
};

/** What the first words of a requirement name; undefined where they name nothing known. */
function subjectOf(circuit: Circuit, words: readonly Token[]): Subject | undefined {
  const name = words.map((token) => token.text).join('');
  const component = (id: string): Circuit['components'][number] | undefined => circuit.components.find((one) => one.id === id);
  const whole = component(name);
  if (whole) return { is: 'component', component: whole };
  const dot = name.lastIndexOf('.');
  const owner = dot < 0 ? undefined : component(name.slice(0, dot));
  if (owner) return { is: 'component', component: owner, port: name.slice(dot + 1) };
  if (circuit.lines.some((line) => line.name === name)) return { is: 'line' };
  if (circuit.cycles.some((cycle) => cycle.id === name)) return { is: 'cycle' };
  return circuit.cycles.some((cycle) => cycle.steps.some((step) => step.id === name || step.name === name)) ? { is: 'step' } : undefined;
}

const isMeasure = (word: string): word is Measure => word in MEASURE_ABOUT;

const ACTIONS: readonly Proposal[] = [
  word('energise', 'make coils live', 1),
  word('shift', 'move a lever valve', 2),
  word('stop', 'stop drives', 2),
  word('run', 'run another cycle', 2),
];
const CONDITION_VERBS: readonly Proposal[] = ['on', 'off', 'extended', 'retracted', 'at', 'above', 'below'].map((one) => word(one, '', 2));

/** The last word of the statement that opens a part: what follows it decides what may stand here. */
function lastOf(
  tokens: readonly Token[],
  words: readonly string[],
): { readonly opener: string; readonly rest: readonly Token[] } | undefined {
  for (let i = tokens.length - 1; i >= 0; i -= 1) {
    const token = tokens[i];
    if (token?.type === 'word' && words.includes(token.text)) return { opener: token.text, rest: tokens.slice(i + 1) };
  }
  return undefined;
}

const isName = (token: Token | undefined): boolean => token?.type === 'word';
/** True where a name is expected: nothing written yet, or after a separator. */
function wantsName(rest: readonly Token[], separators: readonly string[]): boolean {
  const last = rest.at(-1);
  return !last || separators.includes(last.text);
}

function condition(circuit: Circuit, rest: readonly Token[], follow: readonly Proposal[]): Proposal[] {
  if (wantsName(rest, ['and', 'or', '('])) return conditionNames(circuit);
  const last = rest.at(-1);
  if (last && ['at', 'above', 'below'].includes(last.text)) return constants(circuit);
  if (last && (['on', 'off', 'extended', 'retracted', ')'].includes(last.text) || last.type === 'unit'))
    return [word('and'), word('or'), ...follow];
  return isName(last) ? [...CONDITION_VERBS, word('and'), word('or'), ...follow] : [];
}

function actionParts(
  circuit: Circuit,
  found: { readonly opener: string; readonly rest: readonly Token[] },
  follow: readonly Proposal[],
): Proposal[] {
  const { opener, rest } = found;
  const last = rest.at(-1);
  switch (opener) {
    case 'energise':
      if (wantsName(rest, [','])) return coils(circuit);
      return isName(last)
        ? [word('at', 'command'), word('from', 'ramp'), word('over', 'ramp time'), ...follow]
        : last?.type === 'unit'
          ? [word('to'), word('over'), ...follow]
          : [];
    case 'shift':
      if (wantsName(rest, [','])) return components(circuit, ['directional'], 1);
      if (last?.text === 'to') return ['a', 'b', 'centre'].map((one) => word(one, 'position', 1));
      return rest.some((token) => token.text === 'to') ? [...follow] : [word('to')];
    case 'stop':
      return wantsName(rest, [',']) ? components(circuit, ['drive'], 1) : [...follow];
    case 'run':
      return wantsName(rest, []) ? cycles(circuit, 1) : last?.type === 'number' ? [word('times')] : [...follow];
    default:
      return [];
  }
}

const STEP_FOLLOW: readonly Proposal[] = [
  word('until', 'ends when'),
  word('for', 'lasts'),
  word('at most', 'time limit', 6),
  ...ACTIONS.map((one) => ({ ...one, rank: 7 })),
];

export function step(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  // "step" and its name.
  if (statement.length < 2) return [];
  const inside = statement.slice(2);
  const last = inside.at(-1)?.text ?? '';
  if (inside.length === 0) return [...ACTIONS, word('until', 'ends when', 2), word('for', 'lasts', 2)];
  if (last === ',' && !lastOf(inside, ['energise', 'shift', 'stop'])) return [word('at most', 'time limit', 1)];
  const found = lastOf(inside, ['energise', 'shift', 'stop', 'run', 'until', 'for', 'most']);
  if (!found) return [];
  if (last === ',') {
    const limit: Proposal = word('at most', 'time limit', 4);
    return found.opener === 'until' || found.opener === 'for' ? [limit] : [...actionParts(circuit, found, []), limit];
  }
  if (found.opener === 'until')
    return condition(circuit, found.rest, [{ ...word('at most', 'time limit', 6), label: ', at most', insert: ', at most ' }]);
  if (found.opener === 'for') return found.rest.at(-1)?.type === 'unit' ? [word('and until'), word('until')] : constants(circuit, ['time']);
  if (found.opener === 'most') return constants(circuit, ['time']);
  return actionParts(circuit, found, STEP_FOLLOW);
}

export function whileLine(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement.slice(1), ['energise', 'shift', 'stop', 'run']);
  return found ? actionParts(circuit, found, []) : condition(circuit, statement.slice(1), ACTIONS);
}

export function interlock(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement, ['needs']);
  if (found) return condition(circuit, found.rest, []);
  return wantsName(statement.slice(1), [',']) ? coils(circuit) : [word('needs', 'condition', 1)];
}

export function emergency(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement, ['energise', 'shift', 'stop', 'run']);
  return found ? actionParts(circuit, found, ACTIONS) : [...ACTIONS];
}

export function requirement(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const inside = statement.slice(1);
  if (inside.length === 0)
    return [
      word('never', 'a condition that must not come about', 2),
      ...components(circuit, undefined, 3),
      ...places(circuit).filter((one) => one.kind === CompletionItemKind.Interface),
      ...cycles(circuit, 3),
      ...steps(circuit, 4),
    ];
  if (inside[0]?.text === 'never') return condition(circuit, inside.slice(1), []);
  const at = inside.findIndex((token) => token.text === 'still' || isMeasure(token.text));
  if (at < 0) {
    const subject = subjectOf(circuit, inside);
    const fitting = subject ? measuresOf(subject) : MEASURES;
    const moves =
      !subject ||
      (subject.is === 'component' && ['cylinder', 'motor', 'rotary'].includes(subject.component.kind) && subject.port === undefined);
    return [...fitting.map((name) => word(name, MEASURE_ABOUT[name], 1)), ...(moves ? [word('still', 'no motion but leakage', 1)] : [])];
  }
  const rest = inside.slice(at + 1);
  const last = rest.at(-1);
  const bounds: Proposal[] = [word('at least', '', 2), word('at most', '', 2), word('between', '', 2), word('reaches', 'at some point', 2)];
  const where: Proposal[] = [
    word('in', 'step, cycle or state', 1),
    word('from', 'range of the stroke', 3),
    word('extending', '', 3),
    word('retracting', '', 3),
  ];
  if (
    last?.text === 'in' ||
    (last?.text === 'and' && rest.some((token) => token.text === 'in') && !rest.some((token) => token.text === 'between'))
  )
    return [...steps(circuit, 1), ...cycles(circuit, 2), ...STATES];
  if (last?.text === 'at') return [word('least'), word('most')];
  if (last && ['least', 'most', 'between', 'reaches', 'from', 'to', 'for', 'within'].includes(last.text)) return constants(circuit);
  const bounded = rest.some((token) => ['least', 'most', 'between', 'reaches'].includes(token.text));
  if (bounded)
    return last?.type === 'unit'
      ? rest.some((token) => token.text === 'between') && !rest.some((token) => token.text === 'and')
        ? [word('and')]
        : [word('for', 'held so long'), ...(rest.some((token) => token.text === 'reaches') ? [word('within')] : [])]
      : [];
  if (last?.type === 'unit' && rest.some((token) => token.text === 'from') && !rest.some((token) => token.text === 'to'))
    return [word('to', '', 1)];
  return [...where, ...(inside[at]?.text === 'still' ? [word('and', 'another place'), word('for', 'held so long')] : bounds)];
}

/** Dimension of a number in a control line. */
export function controlDimensions(circuit: Circuit, statement: readonly Token[]): readonly Dimension[] {
  const head = statement[0]?.text;
  if (head === 'require') {
    const opener = lastOf(statement.slice(0, -1), ['from', 'for', 'within', 'least', 'most', 'between', 'reaches', 'above', 'below', 'at']);
    if (opener?.opener === 'for' || opener?.opener === 'within') return ['time'];
    if (opener?.opener === 'from') return ['length', 'angle'];
    const at = statement.findIndex((token) => isMeasure(token.text));
    const measure = statement[at]?.text ?? '';
    if (!isMeasure(measure)) return ['length', 'pressure', 'temperature', 'angle'];
    const subject = subjectOf(circuit, statement.slice(1, at));
    const found = subject && measureOf(measure, subject);
    return found && 'dimension' in found ? [found.dimension] : [];
  }
  const opener = lastOf(statement.slice(0, -1), ['for', 'most', 'over', 'at', 'from', 'above', 'below', 'to']);
  if (opener?.opener === 'for' || opener?.opener === 'most' || opener?.opener === 'over') return ['time'];
  if (opener?.opener === 'above' || opener?.opener === 'below') return ['length', 'pressure', 'temperature', 'angle'];
  return lastOf(statement, ['until'])?.rest.some((token) => token.text === 'at') ? ['length', 'angle'] : ['ratio', 'pressure', 'flow'];
}
