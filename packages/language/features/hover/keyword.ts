/** Hover on a word of the notation: what it is, its ports and properties; what each state and condition word means. */
import { KINDS, KIND_NAMES, LIMITS_PROPERTIES, LINE_PROPERTIES, LOAD_PROPERTIES, type KindName, type PropertySpec } from '@oilway/circuit';
import { LINE_FUNCTIONS } from '../../parse/words.ts';
import { HEAD_ABOUT } from '../completion/heads.ts';
import { paragraphs, table } from './show.ts';

const FORM: Readonly<Record<string, string>> = {
  circuit: 'circuit NAME "Title"',
  use: 'use "power-unit.oilway"',
  display: 'display metric | us | as written',
  let: 'let system = 160 bar',
  part: 'part check NonReturn (crack 0.5 bar, passes 80 L/min at 2 bar)',
  assembly: 'assembly PowerUnit (system 160 bar) ports P, T { .. }',
  unit: 'unit U1 as PowerUnit (system 210 bar)',
  plug: 'plug V1.X',
  load: 'load C1 (mass 120 kg, friction 250 N, resist 9 kN from 270 mm to 315 mm extending)',
  limits: 'limits (velocity return 3 m/s, temperature 60 degC, idle 20 bar)',
  controls: 'controls "plc/station.st" (SOL1 "Y_Clamp", PS1 "B_Tight")',
  allow: 'allow D09 on C1.cap "reason"',
  cycle: 'cycle Drill { step Out energise SOL1 until LS1 on, at most 12 s }',
  manual: 'manual Table { step Raise energise SOL1 until LS1 on }',
  step: 'step Out energise SOL1, SOL2 until LS1 on, at most 12 s',
  meanwhile: 'meanwhile Punch energise SOL3 until PS2 on, at most 4 s',
  while: 'while Drill energise SOL0',
  interlock: 'interlock SOL2 needs PS1 on',
  emergency: 'emergency stop M1',
  require: 'require C2 speed in Out between 8 mm/s and 12 mm/s',
};

export const WORD_ABOUT: Readonly<Record<string, string>> = {
  REST: 'State: drives turn, all coils are dead, valves stand as their springs or detents hold them.',
  OFF: 'State: drives stopped, all coils dead; accumulators charged, and empty.',
  STOP: 'State: emergency stop. Coils dead but for those `emergency` keeps; drives as `emergency` says.',
  IDLE: 'State: as REST, and `while` lines that are true without a cycle act.',
  energise: 'Makes coils live for as long as the step or the condition lasts. What a step does not list is dead.',
  shift: 'Moves a lever valve to a position for as long as the step lasts.',
  until: 'The step ends when the condition is true; a step already satisfied ends at once.',
  over: 'Ramp time of a command.',
  extended: 'The actuator stands at its outer stop (within 0.5 mm or 0.2 % of the stroke).',
  retracted: 'The actuator stands at its inner stop (within 0.5 mm or 0.2 % of the stroke).',
  still: 'No motion but leakage, in every variant of the places named.',
  reaches: 'The bound is crossed at some point of the place.',
  never: 'The condition must not come about: in no step, manual function or reachable switch state.',
};

const isKind = (word: string): word is KindName => (KIND_NAMES as readonly string[]).includes(word);

export function propertyRows(specs: readonly PropertySpec[]): string {
  return table(
    ['Property', 'Example', 'Unsaid', 'Meaning'],
    specs.map((spec) => [
      spec.required ? `**${spec.name}**` : spec.name,
      `\`${spec.example}\``,
      spec.required ? 'required' : spec.default === '—' ? '' : spec.default,
      spec.about,
    ]),
  );
}

export function hoverKeyword(word: string): string | undefined {
  if (isKind(word)) {
    const kind = KINDS[word];
    const ports = kind.ports.map(
      (port) =>
        `- ${port.name}: ${port.role === 'any' ? 'any line' : port.role}${port.required ? '' : ', if used'}${port.about ? ` (${port.about})` : ''}`,
    );
    return paragraphs(
      `**${word}**: ${kind.about || kind.noun}`,
      ports.length > 0 ? `Ports\n${ports.join('\n')}` : 'No ports.',
      chainWords(word),
      propertyRows(kind.properties),
    );
  }
  if ((LINE_FUNCTIONS as readonly string[]).includes(word)) {
    return paragraphs(
      `**${word}**: ${HEAD_ABOUT[word] ?? 'line'}`,
      `\`${word} V1.A to FC1 to C1.cap (bore 12 mm)\``,
      propertyRows(LINE_PROPERTIES),
    );
  }
  const about = HEAD_ABOUT[word];
  if (about) {
    const specs = word === 'load' ? LOAD_PROPERTIES : word === 'limits' ? LIMITS_PROPERTIES : undefined;
    return paragraphs(`**${word}**: ${about}`, FORM[word] ? `\`${FORM[word]}\`` : '', specs ? propertyRows(specs) : '');
  }
  return WORD_ABOUT[word] ? paragraphs(`**${word}**`, WORD_ABOUT[word]) : undefined;
}

function chainWords(name: KindName): string {
  const { chain, ports } = KINDS[name];
  if (ports.length === 0) return '';
  if (chain.how === 'through') return `In a line: passed from ${chain.from} to ${chain.to}.`;
  if (chain.how === 'end')
    return `In a line: ${chain.entry} where the line comes to it, ${chain.exit} where one starts; never passed through.`;
  if (chain.how === 'fixed') return `In a line: ends at ${chain.port}.`;
  if (chain.how === 'none') return 'In a line: write the port.';
  return 'In a line: at an end only; any number of lines.';
}
