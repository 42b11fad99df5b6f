/** The rules as the editor needs them: the list that `allow` proposes, and the page of every code. */
import { codePages, RULES } from '@oilway/rules';
import { LANGUAGE_CODES } from '../code-pages.ts';

export const ruleList = (): readonly { readonly code: string; readonly title: string }[] =>
  RULES.map(({ code, title }) => ({ code, title }));

/** Markdown of a rule's page, or of a code of the language itself. */
export function rulePage(code: string): string | undefined {
  const own = LANGUAGE_CODES[code];
  return own ? `# ${code} ${own.title}\n\n${own.page}\n` : codePages[code];
}
