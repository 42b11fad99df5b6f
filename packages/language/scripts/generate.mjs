/** Makes the grammar from its template and the kind tables, then the parser from the grammar, so that the words cannot drift apart. */
import { execFileSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { KIND_NAMES } from '../../circuit/kinds/names.ts';
import { RESERVED_WORDS } from '../parse/words.ts';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
const words = (list) => list.map((word) => `'${word}'`).join(' | ');

/** The grammar's text, as it must stand in grammar/oilway.langium. */
export function grammarText() {
  const template = readFileSync(join(root, 'grammar/oilway.template.langium'), 'utf8');
  return template.replace('/*KINDS*/', words(KIND_NAMES)).replace('/*SMALL*/', words(RESERVED_WORDS));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  writeFileSync(join(root, 'grammar/oilway.langium'), grammarText());
  const cli = fileURLToPath(new URL('../bin/langium.js', import.meta.resolve('langium-cli')));
  execFileSync(process.execPath, [cli, 'generate'], { cwd: root, stdio: 'inherit' });
}
