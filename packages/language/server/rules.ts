/** The rules as the editor needs them: the list that `allow` proposes, and each one's page. */
import type { Rule } from '@oilway/rules';
const RULES: readonly Rule[] = [];

const byCode = new Map<string, Rule>(RULES.map((rule) => [rule.code, rule]));

export const ruleList = (): readonly { readonly code: string; readonly title: string }[] => RULES.map(({ code, title }) => ({ code, title }));

/** Markdown: title, why, ground, how it is decided, what mends it. Undefined for codes of the language itself. */
export function rulePage(code: string): string | undefined {
  const rule = byCode.get(code);
  if (!rule) return undefined;
  return [`# ${rule.code} ${rule.title}`, rule.why, `Ground: ${rule.ground}`, rule.page, `Mend: ${rule.mend}`].filter(Boolean).join('\n\n');
}
