/** `oilway explain`: the page of one code or word, or the list of all. */
import { RULES, codePages, ruleOf } from '@oilway/rules';
import type { Paint } from '../text/colour.ts';
import { table } from '../text/table.ts';
import { LANGUAGE_CODES } from '@oilway/language';
import type { Exit, Output } from './outcome.ts';
import { explainWord, WORDS } from './word.ts';

export function explain(code: string | undefined, output: Output, paint: Paint): Exit {
  if (code === undefined) {
    const columns = [{ title: 'code' }, { title: 'severity' }, { title: 'what it finds' }];
    const rows = [...RULES].sort((a, b) => (a.code < b.code ? -1 : 1)).map((rule) => [rule.code, rule.severity, rule.title]);
    const own = Object.entries(LANGUAGE_CODES).map(([name, one]) => [name, one.severity, one.title]);
    for (const line of table(columns, [...rows, ...own], paint.strong)) output.out(line);
    output.out('');
    output.out(`words of the notation: ${WORDS.join(', ')}`);
    return 0;
  }
  if (explainWord(code.toLowerCase(), output, paint)) return 0;
  const known = code.toUpperCase();
  const own = LANGUAGE_CODES[known];
  const page = own === undefined ? codePages[ruleOf(known)?.code ?? ''] : `# ${known} ${own.title}\n\n${own.page}`;
  if (page === undefined) {
    const near = RULES.filter((one) => one.code.startsWith(code.slice(0, 1).toUpperCase())).map((one) => one.code);
    output.err(
      `oilway: there is no code ${code}${near.length === 0 ? '' : ` (of that letter: ${near.join(', ')})`}; oilway explain lists all`,
    );
    return 2;
  }
  const [title = '', ...rest] = page.trim().split('\n');
  output.out(paint.strong(title.replace(/^# /, '')));
  for (const line of rest) output.out(line);
  return 0;
}
