/** The words of the notation: line heads, reserved words, and what may not be a name. */
import { KIND_NAMES } from '@oilway/circuit';

export const LINE_FUNCTIONS = ['suction', 'working', 'return', 'pilot', 'drain'] as const;

/** Words that begin a statement. */
export const LINE_HEADS: readonly string[] = [
  'circuit',
  'use',
  'display',
  'let',
  'part',
  'assembly',
  'unit',
  ...KIND_NAMES,
  ...LINE_FUNCTIONS,
  'plug',
  'load',
  'limits',
  'controls',
  'allow',
  'cycle',
  'manual',
  'step',
  'meanwhile',
  'while',
  'interlock',
  'emergency',
  'require',
];

/** Small words inside statements; no name may be one. */
export const RESERVED_WORDS: readonly string[] = [
  'to',
  'at',
  'from',
  'in',
  'on',
  'off',
  'and',
  'or',
  'until',
  'above',
  'below',
  'between',
  'least',
  'most',
  'reaches',
  'over',
  'times',
  'for',
  'needs',
  'with',
  'as',
  'by',
  'within',
  'extending',
  'retracting',
  'extended',
  'retracted',
  'energise',
  'shift',
  'stop',
  'run',
  'never',
  'still',
  'repeat',
  'ports',
];

/** Positions of a valve: no names either. */
export const POSITION_WORDS: readonly string[] = ['a', 'b', 'centre'];

const heads = new Set(LINE_HEADS);
const reserved = new Set(RESERVED_WORDS);
const positions = new Set(POSITION_WORDS);

export const isLineHead = (word: string): boolean => heads.has(word);
export const isReserved = (word: string): boolean => reserved.has(word);
/** True where the word cannot name a component, line, coil, constant or cycle. */
export const isNoName = (word: string): boolean => heads.has(word) || reserved.has(word) || positions.has(word);
