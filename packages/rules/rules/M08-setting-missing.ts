/** M08: an adjustable component without its value. Found while the text is resolved; here is what the rule says of itself. */
import type { Rule } from '../rule.ts';

export const M08: Rule = {
  code: 'M08',
  name: 'setting-missing',
  title: 'Setting or size missing',
  severity: 'error',
  why: 'Without it the component cannot be set at commissioning, and nothing that depends on it is computed.',
  ground: 'ISO 1219-2, technical information on circuit diagrams',
  mend: 'Give the value, or write `?` to have it found.',
  needs: 'topology',
  page: `
Each kind has properties that it cannot do without (a relief its \`set\` and \`passes\`, a cylinder its \`bore\` and \`stroke\`) and groups of which one must stand (a directional
valve \`spring to\`, \`detent\` or \`normally\`). Told at the component's name; a fix inserts the property with a value of the usual form. What does not depend
on the missing value is computed all the same.

Stays clean: \`?\` (to be found by sizing); values that come from a \`part\`; properties with a default, which are listed among the assumptions.`,
  // The text is resolved before rules run: these findings come from there.
  detect: () => [],
};
