/** `oilway explain cylinder`: a word of the notation, from the same tables as completion and hover. */
import { KIND_NAMES, KINDS, LIMITS_PROPERTIES, LINE_PROPERTIES, LOAD_PROPERTIES, type KindName, type PropertySpec } from '@oilway/circuit';
import type { Paint } from '../text/colour.ts';
import { table } from '../text/table.ts';
import type { Output } from './outcome.ts';

const LINES: readonly string[] = ['line', 'suction', 'working', 'return', 'pilot', 'drain'];

const isKind = (word: string): word is KindName => (KIND_NAMES as readonly string[]).includes(word);

function settings(specs: readonly PropertySpec[], output: Output, paint: Paint): void {
  const columns = [{ title: 'setting' }, { title: 'example' }, { title: 'unsaid' }, { title: 'meaning' }];
  const rows = specs.map((spec) => [
    spec.name,
    spec.example,
    spec.required ? 'required' : spec.default === '—' ? '' : spec.default,
    spec.about.replaceAll('`', ''),
  ]);
  for (const line of table(columns, rows, paint.strong)) output.out(line);
}

/** Prints the page of a word; false where the word is none of the tables. */
export function explainWord(word: string, output: Output, paint: Paint): boolean {
  if (isKind(word)) {
    const kind = KINDS[word];
    output.out(paint.strong(`${word}: ${kind.noun}`));
    output.out(kind.about.replaceAll('`', ''));
    if (kind.ports.length > 0) {
      output.out('');
      const rows = kind.ports.map((port) => [port.name, port.role, port.required ? 'required' : 'if used', port.about.replaceAll('`', '')]);
      for (const line of table([{ title: 'port' }, { title: 'role' }, { title: 'joined' }, { title: 'meaning' }], rows, paint.strong))
        output.out(line);
    }
    output.out('');
    settings(kind.properties, output, paint);
    for (const group of kind.groups) output.out(`${group.need} of: ${group.of.join(', ')}`);
    return true;
  }
  const specs = LINES.includes(word)
    ? LINE_PROPERTIES
    : word === 'load'
      ? LOAD_PROPERTIES
      : word === 'limits'
        ? LIMITS_PROPERTIES
        : undefined;
  if (specs === undefined) return false;
  output.out(paint.strong(word === 'line' || word === 'load' || word === 'limits' ? word : `${word}: a line`));
  settings(specs, output, paint);
  return true;
}

/** Every word that has a page. */
export const WORDS: readonly string[] = [...KIND_NAMES, 'line', 'load', 'limits'];
