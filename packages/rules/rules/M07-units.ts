/** M07: units. Found while the text is resolved; here is what the rule says of itself. */
import type { Rule } from '../rule.ts';

export const M07: Rule = {
  code: 'M07',
  name: 'units',
  title: 'Number without a unit, or with a unit that does not fit',
  severity: 'error',
  why: 'A pressure in psi read as bar is wrong by a factor of 14.5; a number without a unit is read as anyone likes.',
  ground: 'ISO 80000; ISO 4413, documentation',
  mend: 'Write the unit behind the number.',
  needs: 'topology',
  page: `
Every number has its unit, and the unit has the dimension its property asks for: \`set 160 bar\`, never \`set 160\` and never \`set 160 L/min\`. Told where a unit
is missing, unknown, or of another dimension; a fix offers the units that fit, most used in the file first.

Pressures are gauge; \`bara\` and \`psia\` are converted. Gallons are US gallons; imperial ones are written \`UKgal\`.

Stays clean: plain numbers where they belong (\`grade 46\`, \`bends 4\`), ratios (\`3:1\`, \`94 %\`), constants that carry their unit.`,
  // The text is resolved before rules run: these findings come from there.
  detect: () => [],
};
