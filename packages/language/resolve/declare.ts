/** The names of everything a file declares, before anything is read: the order of statements is free. */
import type { Cycle as CycleNode, Name, Statement, Step as StepNode } from '../generated/ast.ts';
import { isNoName } from '../parse/words.ts';
import { type Components, isKind } from './components.ts';
import type { Context } from './context.ts';

/** Names of everything, before anything is read: the order of statements is free. */
export function declareNames(context: Context, components: Components, statements: readonly Statement[]): void {
  const name = (
    node: Name | undefined,
    what: Parameters<Context['declare']>[1],
    statement: Statement,
    detail: Parameters<Context['declare']>[3] = {},
  ): boolean => {
    if (node?.text !== undefined && isNoName(node.text)) {
      context.report({
        code: 'NAME',
        what: `\`${node.text}\` is a word of the notation and cannot be a name`,
        origin: context.origin(node),
      });
    }
    return context.declare(node, what, statement, detail) !== undefined;
  };
  for (const statement of statements) {
    switch (statement.$type) {
      case 'Let':
        if (name(statement.name, 'constant', statement) && statement.name?.text !== undefined)
          context.constants.set(statement.name.text, statement);
        break;
      case 'Component': {
        const kind = statement.kind?.text;
        const detail = isKind(kind) ? { kind } : {};
        for (const node of statement.names ?? []) {
          const fresh = name(node, statement.reusable === true ? 'part' : 'component', statement, detail);
          if (fresh && statement.reusable === true && node.text !== undefined) components.addPart(node.text, statement);
        }
        break;
      }
      case 'Unit':
        for (const node of statement.names ?? []) name(node, 'unit', statement);
        break;
      case 'Assembly':
        name(statement.name, 'assembly', statement);
        break;
      case 'Line':
        if (statement.name !== undefined) name(statement.name, 'line', statement);
        break;
      case 'Cycle':
        name(statement.name, 'cycle', statement);
        declareSteps(context, statement);
        break;
      case 'Step':
        context.report({
          code: 'SYNTAX',
          what: `A \`${statement.kind ?? 'step'}\` stands inside a \`cycle\` or \`manual\`, between its braces`,
          origin: context.origin(statement),
        });
        break;
      default:
    }
  }
  context.uses = statements.some((statement) => statement.$type === 'Use');
  for (const statement of statements) if (statement.$type === 'Unit') assemblyOf(context, statement.assembly);
  notResolvedYet(context, statements);
}

/** The assembly a unit is made of: in this file, or in one that is used. */
function assemblyOf(context: Context, node: Name | undefined): void {
  const word = node?.text;
  if (word === undefined) return;
  const origin = context.origin(node);
  const declared = context.names.get(word);
  if (declared === undefined) context.unknownName(word, origin, (d) => d.what === 'assembly', 'an assembly');
  else if (declared.what === 'assembly') context.refer(origin, declared.id);
  else context.report({ code: 'NAME', what: `\`${word}\` is a ${declared.what}; a unit is made of an assembly`, origin });
}

function declareSteps(context: Context, cycle: CycleNode): void {
  const owner = cycle.name?.text;
  for (const line of cycle.lines ?? []) {
    if (line.$type === 'Step') {
      if (owner !== undefined) declareStep(context, line, owner);
      continue;
    }
    if (line.$type !== 'While' && line.$type !== 'Stray') {
      context.report({
        code: 'SYNTAX',
        what: 'Only `step`, `meanwhile` and `while` lines stand inside a cycle: this line belongs outside its braces',
        origin: context.origin(line),
        related: [{ message: 'the cycle', origin: context.origin(cycle.name) }],
      });
    }
  }
}

function declareStep(context: Context, step: StepNode, owner: string): void {
  const word = step.name?.text;
  if (word === undefined || step.name === undefined) return;
  if (isNoName(word))
    context.report({
      code: 'NAME',
      what: `\`${word}\` is a word of the notation and cannot be a name`,
      origin: context.origin(step.name),
    });
  const id = `${owner}.${word}`;
  if (context.declareWord(word, context.origin(step.name), 'step', context.origin(step), { id }) === undefined) return;
  const known = context.stepsByName.get(word);
  if (known === undefined) context.stepsByName.set(word, [id]);
  else known.push(id);
}

/** What other files and assemblies hold is understood but not resolved: said at each statement, so that nothing seems computed that is not. */
function notResolvedYet(context: Context, statements: readonly Statement[]): void {
  for (const statement of statements) {
    const said = notResolved(statement);
    if (said === undefined) continue;
    const origin = context.origin(statement.$type === 'Assembly' ? (statement.name ?? statement) : statement);
    context.notComputed.push({ what: said.what, why: 'not resolved yet', origin });
    context.report({ code: 'NOT-COMPUTED', severity: 'information', what: `Not resolved yet: ${said.what}`, mend: said.mend, origin });
  }
}

function notResolved(statement: Statement): { readonly what: string; readonly mend: string } | undefined {
  const mend = 'What the rest of the file says is computed; write the unit out to have it computed too.';
  switch (statement.$type) {
    case 'Use':
      return {
        what: '`use` reads no other file; names that may stand there are not looked for',
        mend: 'Write what is needed of the other file into this one to have it computed.',
      };
    case 'Unit':
      return { what: 'units of an assembly are not computed', mend };
    case 'Assembly':
      return { what: 'units of an assembly are not computed; its own statements are checked', mend };
    default:
      return undefined;
  }
}
