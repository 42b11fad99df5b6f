/** The rules as the editor needs them: the list that `allow` proposes, and each one's page. */
import { codePages, RULES } from '@oilway/rules';

export const ruleList = (): readonly { readonly code: string; readonly title: string }[] =>
  RULES.map(({ code, title }) => ({ code, title }));

/** Markdown; undefined for codes of the language itself. */
export const rulePage = (code: string): string | undefined => codePages[code];
