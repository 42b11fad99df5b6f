/** What a server needs from where it runs: a study beside it, and files. */
import type { StudyRunner } from './study-runner.ts';
import type { InitializationOptions } from './protocol.ts';

export interface Host {
  /** Where the study runs; called once, when the client has said hello. */
  study(options: InitializationOptions): StudyRunner;
  /** Text of a file that is not open; undefined where this host cannot read it (the client is asked then). */
  readFile?(uri: string): Promise<string | undefined>;
  /** Addresses of the circuits under a folder; undefined where this host cannot list it. */
  listCircuits?(folder: string): Promise<readonly string[] | undefined>;
}
