/** What computes and checks, as the server and its study worker use it. */
import type { Engines } from '../service.ts';

export const engines: Engines = {};
