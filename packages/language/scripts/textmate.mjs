/** Makes syntaxes/oilway.tmLanguage.json from the kind and unit tables, so that colouring knows every word the notation knows and no other. */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { KINDS, LIMITS_PROPERTIES, LINE_PROPERTIES, LOAD_PROPERTIES } from '@oilway/circuit';
import { UNIT_SPELLINGS } from '@oilway/quantity';
import { LINE_FUNCTIONS, LINE_HEADS, RESERVED_WORDS } from '../parse/words.ts';
import { MEASURES } from '../resolve/measures.ts';

const OTHER_HEADS = ['circuit', 'use', 'display', 'let', 'part', 'assembly', 'unit', 'plug', 'load', 'limits', 'controls', 'allow'];
const CONTROL_HEADS = ['cycle', 'manual', 'step', 'meanwhile', 'while', 'interlock', 'emergency', 'require'];
/** Words of settings that are no part of a table's word list: named centres, attitudes, places. */
const FORM_WORDS = ['closed', 'open', 'tandem', 'float', 'a', 'b', 'centre', 'rod', 'up', 'down', 'level', 'none', 'retracted', 'extended'];

const escaped = (text) => text.replace(/[.*+?^${}()|[\]\\/]/g, '\\$&');
/** Longest first, so that no word hides a longer one. */
const oneOf = (words) =>
  [...new Set(words)]
    .sort((a, b) => b.length - a.length || (a < b ? -1 : 1))
    .map(escaped)
    .join('|');
const END = '(?![\\p{L}\\p{N}_])';
const START = '(?<![\\p{L}\\p{N}_.])';

export function textmateGrammar() {
  const specs = [...Object.values(KINDS).flatMap((kind) => kind.properties), ...LINE_PROPERTIES, ...LOAD_PROPERTIES, ...LIMITS_PROPERTIES];
  const properties = oneOf(specs.map((spec) => spec.name));
  const values = oneOf([...FORM_WORDS, ...LINE_FUNCTIONS, ...specs.flatMap((spec) => ('words' in spec.shape ? spec.shape.words : []))]);
  const units = oneOf(UNIT_SPELLINGS.map(({ spelling }) => spelling));
  const kinds = oneOf(Object.keys(KINDS));
  const heads = oneOf(LINE_HEADS);
  const name = '[\\p{L}\\p{N}_]+';
  return {
    name: 'Oilway',
    scopeName: 'source.oilway',
    fileTypes: ['oilway'],
    patterns: [{ include: '#comments' }, { include: '#heads' }, { include: '#brackets' }, { include: '#rest' }],
    repository: {
      comments: {
        patterns: [
          { name: 'comment.line.double-slash.oilway', match: '//.*$' },
          { name: 'comment.block.oilway', begin: '/\\*', end: '\\*/' },
        ],
      },
      heads: {
        patterns: [
          {
            comment: 'A component or part, with its names.',
            begin: `^\\s*(?:(part)\\s+)?(${kinds})${END}`,
            beginCaptures: { 1: { name: 'keyword.other.part.oilway' }, 2: { name: 'storage.type.kind.oilway' } },
            end: '(?=[("]|//|/\\*)|(?=\\bas\\b)|$',
            patterns: [{ name: 'entity.name.type.component.oilway', match: name }, { include: '#punctuation' }],
          },
          {
            match: `^\\s*(${oneOf(LINE_FUNCTIONS)})${END}(?:\\s+(${name})\\s*(:))?`,
            captures: {
              1: { name: 'keyword.other.line.oilway' },
              2: { name: 'variable.other.readwrite.line.oilway' },
              3: { name: 'punctuation.separator.oilway' },
            },
          },
          {
            match: `(?:^|(?<=[{}]))\\s*(let)\\s+(${name})\\s*(=)`,
            captures: {
              1: { name: 'keyword.other.oilway' },
              2: { name: 'variable.other.constant.oilway' },
              3: { name: 'keyword.operator.oilway' },
            },
          },
          {
            match: `(?:^|(?<=[{}]))\\s*(step|meanwhile)\\s+(${name})`,
            captures: { 1: { name: 'keyword.control.oilway' }, 2: { name: 'entity.name.function.step.oilway' } },
          },
          {
            match: `(?:^|(?<=[{}]))\\s*(cycle|manual)\\s+(${name})`,
            captures: { 1: { name: 'keyword.control.oilway' }, 2: { name: 'entity.name.namespace.oilway' } },
          },
          { match: `(?:^|(?<=[{}]))\\s*(${oneOf(CONTROL_HEADS)})${END}`, captures: { 1: { name: 'keyword.control.oilway' } } },
          { match: `^\\s*(${oneOf(OTHER_HEADS)})${END}`, captures: { 1: { name: 'keyword.other.oilway' } } },
        ],
      },
      brackets: {
        comment: 'A bracket ends at the latest where the next line begins with a line head: a lost one colours no other statement.',
        begin: '\\(',
        beginCaptures: { 0: { name: 'punctuation.section.brackets.begin.oilway' } },
        end: `(\\))|(?=^\\s*(?:${heads})${END})`,
        endCaptures: { 1: { name: 'punctuation.section.brackets.end.oilway' } },
        patterns: [
          { include: '#comments' },
          { match: `(?:(?<=[(,])|^)\\s*(${properties})${END}`, captures: { 1: { name: 'support.variable.property.oilway' } } },
          { include: '#brackets' },
          { name: 'constant.language.oilway', match: `${START}(?:${values})${END}` },
          { include: '#rest' },
        ],
      },
      rest: {
        patterns: [
          { name: 'string.quoted.double.oilway', begin: '"', end: '"|$' },
          {
            match: `(\\.)(${name})`,
            captures: { 1: { name: 'punctuation.accessor.oilway' }, 2: { name: 'variable.other.property.port.oilway' } },
          },
          { name: 'variable.other.oilway', match: `${START}[0-9]+[A-DF-Z]+[0-9]+${END}` },
          {
            match: `${START}([0-9]+/[0-9]+|[0-9]+(?:\\.[0-9]+)?(?:[ \\t]+[0-9]+/[0-9]+)?)(?:[ \\t]*(${units})(?![\\p{L}\\p{N}_°²³^]))?`,
            captures: { 1: { name: 'constant.numeric.oilway' }, 2: { name: 'keyword.other.unit.oilway' } },
          },
          { name: 'constant.language.state.oilway', match: `${START}(?:REST|OFF|IDLE|STOP)${END}` },
          { name: 'keyword.operator.word.oilway', match: `${START}(?:${oneOf(RESERVED_WORDS)})${END}` },
          {
            name: 'support.type.measure.oilway',
            match: `${START}(?:${oneOf(MEASURES)})(?=\\s+(?:in|from|at|between|reaches|extending|retracting)\\b)`,
          },
          { name: 'variable.other.oilway', match: `${START}[\\p{L}_][\\p{L}\\p{N}_]*` },
          { include: '#punctuation' },
        ],
      },
      punctuation: {
        patterns: [
          { name: 'punctuation.separator.oilway', match: '[,:]' },
          { name: 'keyword.operator.oilway', match: '\\+-|[±+\\-*/=]' },
          { name: 'keyword.operator.wanted.oilway', match: '\\?' },
          { name: 'punctuation.section.braces.oilway', match: '[{}]' },
        ],
      },
    },
  };
}

/** The file's text. */
export const textmateText = () => `${JSON.stringify(textmateGrammar(), undefined, 2)}\n`;

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  writeFileSync(fileURLToPath(new URL('../../../syntaxes/oilway.tmLanguage.json', import.meta.url)), textmateText());
}
