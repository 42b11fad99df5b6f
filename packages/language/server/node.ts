/** The server as a process: over IPC where the client opened one, else over stdio. The study runs on a thread of its own. */
import { readdir, readFile } from 'node:fs/promises';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { createConnection, ProposedFeatures } from 'vscode-languageserver/node';
import type { Host } from './host.ts';
import { languageAnalyser } from './language-analyser.ts';
import { startServer } from './server.ts';
import { WorkerRunner, type WorkerLike, type WorkerReply } from './study-runner.ts';

/** Beside the bundle `study-worker.cjs`; run from source, the TypeScript file. */
function workerFile(): URL {
  const bundled = new URL('./study-worker.cjs', import.meta.url);
  return existsSync(bundled) ? bundled : new URL('./study-worker-node.ts', import.meta.url);
}

/** Memory of one study, MB: a circuit that needs more is given up with the reason, and the editor goes on. */
const MOST_MEMORY = 1024;

const reasonOf = (reason: unknown): string => {
  if (!(reason instanceof Error)) return String(reason);
  const outOfMemory = (reason as { code?: unknown }).code === 'ERR_WORKER_OUT_OF_MEMORY';
  return outOfMemory ? `the circuit is too large: its study needs more than ${MOST_MEMORY} MB` : reason.message;
};

function startWorker(): WorkerLike {
  const worker = new Worker(workerFile(), { resourceLimits: { maxOldGenerationSizeMb: MOST_MEMORY } });
  // An idle study must not keep a process alive whose client is gone.
  worker.unref();
  return {
    post: (message) => worker.postMessage(message),
    onMessage: (listener) => worker.on('message', (reply: WorkerReply) => listener(reply)),
    onError: (listener) => {
      worker.on('error', (reason) => listener(reasonOf(reason)));
      worker.on('exit', (code) => listener(`the study's thread ended with code ${code}`));
    },
    terminate: () => void worker.terminate(),
  };
}

async function circuitsUnder(folder: string): Promise<string[]> {
  const found: string[] = [];
  const waiting = [folder];
  for (let path = waiting.pop(); path !== undefined; path = waiting.pop()) {
    for (const entry of await readdir(path, { withFileTypes: true }).catch(() => [])) {
      const inner = join(path, entry.name);
      if (entry.isFile() && entry.name.endsWith('.oilway')) found.push(pathToFileURL(inner).href);
      if (entry.isDirectory() && entry.name !== 'node_modules' && !entry.name.startsWith('.')) waiting.push(inner);
    }
  }
  return found;
}

const host: Host = {
  study: () => new WorkerRunner(startWorker),
  readFile: async (uri) => (uri.startsWith('file:') ? readFile(fileURLToPath(uri), 'utf8').catch(() => undefined) : undefined),
  listCircuits: async (folder) => (folder.startsWith('file:') ? circuitsUnder(fileURLToPath(folder)) : undefined),
};

/** With no transport named on the command line (`--stdio`, `--node-ipc`, `--socket`, `--pipe`) stdio is taken. */
export function run(): void {
  const named = process.argv.some((one) => /^--(stdio|node-ipc|socket|pipe|clientProcessId)/.test(one));
  const connection =
    named || process.send ? createConnection(ProposedFeatures.all) : createConnection(ProposedFeatures.all, process.stdin, process.stdout);
  startServer(connection, host, languageAnalyser());
}

run();
