/** A circuit of which nothing is known: an empty text, or one that could not be read. */
import type { Circuit } from './circuit.ts';

export const emptyCircuit = (uri: string): Circuit => ({
  uri,
  display: 'as written',
  units: {},
  components: [],
  coils: [],
  lines: [],
  pieces: [],
  nets: [],
  loads: [],
  cycles: [],
  whiles: [],
  interlocks: [],
  requirements: [],
  allows: [],
  constants: [],
  notComputed: [],
  unknown: {},
});
