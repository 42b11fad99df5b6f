/** Memory of a worker that studies a circuit of 300 components: growth of the whole process at its highest. Part of `npm run bench`. */
import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';
import { isMainThread, parentPort, Worker } from 'node:worker_threads';
import { study } from '@oilway/circuit';
import { analyse } from '@oilway/language';
import { longCircuit } from './long.ts';
import { emit, row } from './rows.ts';

const COMPONENTS = 300;
/** A study that takes longer is cancelled, ms; what it has used by then is told. */
const LONGEST = Number(process.env.BENCH_STUDY_MS ?? 20_000);
const MB = 2 ** 20;

/** Nine lines of head with six components, ten lines an axis with four. */
function text(): string {
  const axes = Math.ceil((COMPONENTS - 6) / 4);
  const cycle = [
    'cycle Go {',
    '  step Out energise SOL1A, SOL2A until LS1 on, at most 20 s',
    '  step Back energise SOL1B, SOL2B until C1 retracted, at most 20 s',
    '}',
  ];
  return `${longCircuit(9 + 10 * axes)}${cycle.join('\n')}\n`;
}

/** Heap of this thread without what is no longer needed, bytes. */
function inUse(): number {
  setFlagsFromString('--expose-gc');
  (runInNewContext('gc') as () => void)();
  return process.memoryUsage().heapUsed;
}

if (isMainThread) {
  const before = process.memoryUsage().rss;
  let highest = before;
  const watch = setInterval(() => {
    highest = Math.max(highest, process.memoryUsage().rss);
  }, 20);
  const worker = new Worker(new URL(import.meta.url));
  worker.once('message', (said: { heap: number; components: number; ms: number; cancelled: boolean; failed?: string }) => {
    clearInterval(watch);
    highest = Math.max(highest, process.memoryUsage().rss);
    const what = 'worker with a 300-component circuit studied';
    if (said.failed !== undefined) emit({ what, why: said.failed });
    else {
      const note = `${said.components} components in ${(said.ms / 1000).toFixed(1)} s${said.cancelled ? ', cancelled there' : ''}; ${(said.heap / MB).toFixed(0)} MB of its heap in use at the end`;
      emit(row(what, [(highest - before) / MB], 'MB', { target: 120, note }));
    }
    void worker.terminate();
  });
} else {
  const began = performance.now();
  let cancelled = false;
  const past = (): boolean => {
    cancelled ||= performance.now() - began > LONGEST;
    return cancelled;
  };
  const document = analyse([{ uri: 'file:///long.oilway', text: text() }], { study: (circuit) => study(circuit, { cancelled: past }) })
    .documents[0];
  const failed = document?.study === undefined ? { failed: `no study: ${document?.failed ?? 'no document'}` } : {};
  const components = document?.circuit.components.length ?? 0;
  const { ms, heap } = { ms: performance.now() - began, heap: inUse() };
  parentPort?.postMessage({ heap, components, ms, cancelled, ...failed });
}
