/** The command's version, from its package. */
import about from './package.json' with { type: 'json' };

export const COMMAND_VERSION: string = about.version;
