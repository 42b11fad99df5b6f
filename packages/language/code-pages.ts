/** Pages of the findings that are no rule's: those of the notation and those of the study. */

export interface CodePage {
  readonly title: string;
  readonly severity: 'error' | 'warning' | 'information';
  /** Markdown without a heading. */
  readonly page: string;
}

export const LANGUAGE_CODES: Readonly<Record<string, CodePage>> = {
  SYNTAX: {
    title: 'The line cannot be read',
    severity: 'error',
    page: `Something is missing, left over or in the wrong order. The line is set aside; every other line is read and computed.

A statement begins with its own word (\`pump\`, \`working\`, \`step\` ...) and ends with its line. Inside brackets it may go on after a comma.`,
  },
  NAME: {
    title: 'A name that is not there, or stands for something else',
    severity: 'error',
    page: `Components, coils, lines, constants and cycles of a circuit share one set of names; a step belongs to its cycle (\`Drill.Clamp\`). Upper and lower
case are different letters. Where a name is nearly right, the message proposes the nearest one.`,
  },
  PORT: {
    title: 'A port that does not exist, is needed, or is taken already',
    severity: 'error',
    page: `Ports are those of the component's kind (a directional valve: those of its shape). Without a port written, a component stands in a line for its natural
port, once; a second line to the same port writes it (\`P1.P\`) or names the line.`,
  },
  CHAIN: {
    title: 'A component that cannot stand there in a line',
    severity: 'error',
    page: `In the middle of a line a component is passed through from its entrance to its exit. Reservoirs, reliefs, unloading valves, written ports and
line names are never in the middle: they end a line or begin one.`,
  },
  VALUE: {
    title: 'A setting that cannot be what is written',
    severity: 'error',
    page: `The value has another dimension than the setting takes, lies outside what is possible, is computed from names that go round in a ring, or stands beside
a setting that excludes it. The component counts as unknown where the value is needed; everything else is computed.`,
  },
  'ALLOW-UNUSED': {
    title: 'A permission that accepts nothing',
    severity: 'warning',
    page: `An \`allow\` statement names a finding that is not there. Left standing, it would hide the finding if it came back for another reason.`,
  },
  REQUIREMENT: {
    title: 'A requirement is missed or cannot be decided',
    severity: 'error',
    page: `The bound does not hold at every steady point of the places named (start, each change of load or cam, end; pressure and power also in the run between
them), within 0.1 % of the bound. A requirement that cannot be decided (a component without figures, a range that is never passed, a pressure that
is not determined) counts as failed and says why.`,
  },
  CYCLE: {
    title: 'The cycle does not run as written',
    severity: 'error',
    page: `A step passes its time limit, waits for what never comes, switches to and fro without end, or two lines ask one coil for different things. The message
names the step, the time and the value that was waited for.`,
  },
  'NOT-COMPUTED': {
    title: 'Understood, but not computed',
    severity: 'information',
    page: `The statement or component is read and kept, but no figure is computed for it. What depends on it is marked; nothing is taken as zero or as passed.`,
  },
};
