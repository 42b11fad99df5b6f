/** Types of the script for its test. */
export function textmateGrammar(): unknown;
export function textmateText(): string;
