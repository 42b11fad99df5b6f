/** Snippets for the usual sub-circuits; each stands for itself and resolves once its names are filled in. */
// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the places of a snippet are written so
import { CompletionItemKind } from 'vscode-languageserver-types';
import type { Proposal } from './item.ts';

interface Snippet {
  readonly label: string;
  readonly about: string;
  readonly lines: readonly string[];
}

export const SNIPPETS: readonly Snippet[] = [
  {
    label: 'two-pump unit',
    about:
      'Large flow for the fast way, small flow at high pressure for the work; the large pump is unloaded by the pressure of the small one.',
    lines: [
      'drive     ${1:M1} (power ${2:5.5} kW, speed 1450 rpm)',
      'pump      ${3:P1} (displacement ${4:40} cm3/rev, driven by ${1:M1}, rated 210 bar) "Low pressure"',
      'pump      ${5:P2} (displacement ${6:8} cm3/rev, driven by ${1:M1}, rated 250 bar) "High pressure"',
      'check     ${7:CV1} (crack 0.5 bar, passes ${8:80} L/min at 3 bar)',
      'unloading ${9:UV1} (set ${10:45} bar, passes ${8:80} L/min at 3 bar)',
      'relief    ${11:RV1} (set ${12:160} bar, passes ${13:100} L/min at 5 bar)',
      'suction ${14:R1} to ${3:P1}, ${5:P2}',
      'working ${3:P1} to ${9:UV1}, ${7:CV1}',
      'working ${15:pressure}: ${5:P2}, ${7:CV1} to ${11:RV1}',
      'pilot   ${15:pressure} to ${9:UV1}.X',
      'return  ${9:UV1}, ${11:RV1} to ${14:R1}',
      '$0',
    ],
  },
  {
    label: 'accumulator block',
    about: 'Accumulator with shut-off, certified relief, bleed valve and gauge, as a station of a pressure line.',
    lines: [
      'accumulator ${1:ACC1} (bladder, volume ${2:10} L, precharge ${3:90} bar at 20 degC, gas nitrogen, rated ${4:330} bar)',
      'shutoff   ${5:BV1} (open, locked, passes ${6:100} L/min at 1 bar)',
      'relief    ${7:RV2} (set ${8:210} bar, certified, passes ${9:60} L/min at 8 bar)',
      'shutoff   ${10:BV2} (closed, passes 10 L/min at 5 bar) "Bleed by hand"',
      'gauge     ${11:G1} (range 0 bar to 400 bar)',
      'working ${12:pressure} to ${5:BV1}.A',
      'working ${5:BV1}.B to ${1:ACC1}, ${7:RV2}, ${10:BV2}, ${11:G1}',
      'return  ${7:RV2}, ${10:BV2} to ${13:R1}',
      '$0',
    ],
  },
  {
    label: 'clamp with reducing valve',
    about:
      'Clamping cylinder at reduced pressure behind a detented valve: it stays clamped when current is lost; a switch proves the pressure.',
    lines: [
      'reducing  ${1:PR1} (set ${2:70} bar, relieving yes, reverse check, passes ${3:40} L/min at 5 bar)',
      'directional ${4:V1} (4/2, detent, coil a ${5:SOL1}, coil b ${6:SOL2}, passes ${3:40} L/min at 5 bar) "Clamp"',
      'cylinder  ${7:C1} (bore ${8:63} mm, rod ${9:36} mm, stroke ${10:60} mm, attitude level) "Clamp"',
      'switch    ${11:PS1} (rises ${12:62} bar, falls ${13:56} bar)',
      'working ${14:pressure} to ${1:PR1}.P',
      'working ${1:PR1}.A to ${4:V1}.P, ${11:PS1}',
      'working ${4:V1}.A to ${7:C1}.cap',
      'working ${4:V1}.B to ${7:C1}.rod',
      'return  ${4:V1}.T to ${15:R1}',
      'drain   ${1:PR1}.Y to ${15:R1}',
      'load ${7:C1} (inward (${16:55} mm: 0 kN, ${10:60} mm: ${17:18} kN), people near)',
      '$0',
    ],
  },
  {
    label: 'pump unit',
    about: 'Reservoir, drive, one pump with its relief, and the oil.',
    lines: [
      'fluid     ${1:HM46} (grade 46, temperature 45 degC)',
      'reservoir ${2:R1} (volume ${3:100} L)',
      'drive     ${4:M1} (power ${5:4} kW, speed 1450 rpm)',
      'pump      ${6:P1} (displacement ${7:16} cm3/rev, driven by ${4:M1}, rated 210 bar)',
      'relief    ${8:RV1} (set ${9:160} bar, passes ${10:40} L/min at 5 bar)',
      'suction ${2:R1} to ${6:P1}',
      'working ${11:pressure}: ${6:P1} to ${8:RV1}',
      'return  ${8:RV1} to ${2:R1}',
      '$0',
    ],
  },
  {
    label: 'cylinder with meter-out',
    about: 'Directional valve and cylinder; the oil leaving the rod side is metered, the way back is free.',
    lines: [
      'directional ${1:V1} (4/3, centre closed, spring to centre, coil a ${2:SOL1}, coil b ${3:SOL2}, passes ${4:40} L/min at 5 bar)',
      'throttle  ${5:FC1} (set ${6:6} L/min, compensated, reverse check)',
      'cylinder  ${7:C1} (bore ${8:50} mm, rod ${9:28} mm, stroke ${10:200} mm, attitude level)',
      'working ${11:pressure} to ${1:V1}.P',
      'working ${1:V1}.A to ${7:C1}.cap',
      'working ${7:C1}.rod to ${5:FC1} to ${1:V1}.B',
      'return  ${1:V1}.T to ${12:R1}',
      '$0',
    ],
  },
];

export const sheetSnippets = (): Proposal[] =>
  SNIPPETS.map((one) => ({
    label: one.label,
    kind: CompletionItemKind.Snippet,
    detail: 'sub-circuit',
    about: `${one.about}\n\n\`\`\`oilway\n${plain(one)}\n\`\`\``,
    insert: one.lines.join('\n'),
    snippet: true,
    rank: 8,
  }));

export const cycleSnippets = (): Proposal[] => [
  {
    label: 'step with switch and limit',
    kind: CompletionItemKind.Snippet,
    detail: 'step',
    insert: 'step ${1:Out} energise ${2:SOL1} until ${3:LS1} on, at most ${4:10} s',
    snippet: true,
    rank: 8,
  },
  {
    label: 'step for a time',
    kind: CompletionItemKind.Snippet,
    detail: 'step',
    insert: 'step ${1:Hold} energise ${2:SOL1} for ${3:2} s',
    snippet: true,
    rank: 8,
  },
];

/** The snippet with its example values, as one would read it. */
export function plain(snippet: Snippet): string {
  return snippet.lines
    .map((line) => line.replace(/\$\{\d+:([^}]*)\}/g, '$1').replace(/\$0/g, ''))
    .filter(Boolean)
    .join('\n');
}
