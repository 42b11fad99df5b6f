/** The settings the server heeds, read from whatever a client sends; what is missing or of another type keeps its default. */
import type { HintSettings } from '../features/inlay-hints.ts';

export interface Settings {
  /** Compute studies. */
  readonly compute: boolean;
  readonly scope: 'open files' | 'workspace';
  readonly hints: HintSettings & { readonly enabled: boolean };
}

export const DEFAULT_SETTINGS: Settings = {
  compute: true,
  scope: 'open files',
  hints: { enabled: true, actuators: true, steps: true, requirements: true, metering: true },
};

function at(value: unknown, ...path: readonly string[]): unknown {
  let here = value;
  for (const name of path) {
    if (typeof here !== 'object' || here === null) return undefined;
    here = (here as Record<string, unknown>)[name];
  }
  return here;
}

export function readSettings(value: unknown): Settings {
  const flag = (otherwise: boolean, ...path: readonly string[]): boolean => {
    const found = at(value, ...path);
    return typeof found === 'boolean' ? found : otherwise;
  };
  const { hints } = DEFAULT_SETTINGS;
  return {
    compute: flag(true, 'compute', 'enabled'),
    scope: at(value, 'findings', 'scope') === 'workspace' ? 'workspace' : 'open files',
    hints: {
      enabled: flag(hints.enabled, 'hints', 'enabled'),
      actuators: flag(hints.actuators, 'hints', 'actuators'),
      steps: flag(hints.steps, 'hints', 'steps'),
      requirements: flag(hints.requirements, 'hints', 'requirements'),
      metering: flag(hints.metering, 'hints', 'metering'),
    },
  };
}
