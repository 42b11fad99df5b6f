/** Types of the script for its test. */
export function grammarText(): string;
