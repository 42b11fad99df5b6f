/** What the parser says when a line does not fit: in trade words, not in token names. */
import type { LangiumCoreServices } from 'langium';
import { nearest } from './near.ts';
import { isLineHead, isReserved } from './words.ts';

type IParserErrorMessageProvider = LangiumCoreServices['parser']['ParserErrorMessageProvider'];
type Mismatch = Parameters<IParserErrorMessageProvider['buildMismatchTokenMessage']>[0];
type NoAlternative = Parameters<IParserErrorMessageProvider['buildNoViableAltMessage']>[0];
type EarlyExit = Parameters<IParserErrorMessageProvider['buildEarlyExitMessage']>[0];
type NotAll = Parameters<IParserErrorMessageProvider['buildNotAllInputParsedMessage']>[0];

const THINGS: Readonly<Record<string, string>> = {
  ID: 'a name',
  TEXT: 'a text in `"`',
  NUMBER: 'a number',
  FRACTION: 'a fraction',
  UNIT: 'a unit',
  EOL: 'the end of the line',
};

const thing = (type: string): string => THINGS[type] ?? `\`${type}\``;

export function seen(token: { readonly image: string; readonly tokenType: { readonly name: string } }): string {
  if (token.tokenType.name === 'EOL' || token.tokenType.name === 'EOF') return 'the line ends';
  if (token.image === '') return `a \`${token.tokenType.name}\` is missing`;
  return `\`${token.image.length > 40 ? `${token.image.slice(0, 40)}...` : token.image}\``;
}

/** Words that may go on where a line of control or a requirement could end: for "did you mean". */
const CONTROL_WORDS = [
  'above',
  'below',
  'extended',
  'retracted',
  'extending',
  'retracting',
  'until',
  'within',
  'over',
  'times',
  'most',
  'least',
  'between',
  'reaches',
  'still',
];

const ENDS: ReadonlySet<string> = new Set(['EOL', 'EOF']);

export class MessageProvider implements IParserErrorMessageProvider {
  buildMismatchTokenMessage(options: Mismatch): string {
    const { expected, actual, previous } = options;
    if (expected.name === 'ID' && !ENDS.has(actual.tokenType.name) && (isReserved(actual.image) || isLineHead(actual.image))) {
      return `\`${actual.image}\` is a word of the notation and cannot be a name`;
    }
    if (expected.name === 'EOF') return `${seen(actual)} does not fit here`;
    if (expected.name === 'EOL') {
      if (actual.image === ',' && /^\d+$/.test(previous.image)) return 'A number has a decimal point, not a comma';
      const near = actual.tokenType.name === 'ID' ? nearest(actual.image, CONTROL_WORDS) : undefined;
      if (near !== undefined) return `\`${actual.image}\` does not fit here: did you mean \`${near}\``;
      return `${seen(actual)} does not fit here: the line could end after ${this.after(previous)}; if it goes on, a sign or word between them is missing (\`(\`, \`,\`, \`to\`)`;
    }
    if (ENDS.has(actual.tokenType.name)) return `The line ends too soon: ${thing(expected.name)} is missing after ${this.after(previous)}`;
    return `${thing(expected.name)} is missing before ${seen(actual)}`.replace(/^a /, 'A ');
  }

  buildNoViableAltMessage(options: NoAlternative): string {
    const actual = options.actual[0];
    if (actual === undefined) return 'Something is missing here';
    const place = PLACES[options.ruleName.replace(/\u200B$/, '')];
    if (ENDS.has(actual.tokenType.name))
      return `The line ends too soon: ${place ?? 'something'} is missing after ${this.after(options.previous)}`;
    if (place !== undefined && isReserved(actual.image)) return `${place.replace(/^a/, 'A')} is missing before \`${actual.image}\``;
    return `${seen(actual)} does not fit here${place === undefined ? '' : `: ${place} should stand here`}`;
  }

  buildEarlyExitMessage(options: EarlyExit): string {
    const actual = options.actual[0];
    return actual === undefined ? 'Something is missing here' : `Something is missing before ${seen(actual)}`;
  }

  buildNotAllInputParsedMessage(options: NotAll): string {
    return `${seen(options.firstRedundant)} does not fit here`;
  }

  private after(token: { readonly image: string } | undefined): string {
    return token === undefined || token.image === '' ? 'what stands before' : `\`${token.image}\``;
  }
}

/** What a rule of the grammar stands for. */
const PLACES: Readonly<Record<string, string>> = {
  Value: 'a value',
  PlainValue: 'a value',
  Factor: 'a value',
  SignedFactor: 'a value',
  HeadlessFactor: 'a value',
  Quantity: 'a value',
  Term: 'a value',
  Property: 'a setting',
  FirstItem: 'a value',
  Item: 'a value',
  Action: 'an action (`energise`, `shift`, `stop`, `run`)',
  Atom: 'a condition',
  Condition: 'a condition',
  Bound: 'a bound (`at least`, `at most`, `between`, `reaches`)',
  Where: 'a place (`in`, `from .. to ..`, `extending`)',
  Require: 'what is required',
  Demand: 'a measure (`speed`, `force`, `pressure` ...) or `still`',
  KindText: 'a kind of component',
  MostLeast: '`least` or `most`',
  WordText: 'a word',
  PlcSymbol: 'a symbol in `"` or a step number',
};
