/** The rig as a program: serves the editor with a workspace and stays until it is interrupted. */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { EditorBuildMissing, editorBuild } from './editor-build.ts';
import { startRig } from './server.ts';

const root = fileURLToPath(new URL('../../..', import.meta.url));

/** Opens the default browser where there is one; the address is printed anyway, so nothing depends on it. */
function openBrowser(address: string): void {
  const [command, args]: [string, string[]] =
    process.platform === 'darwin'
      ? ['open', [address]]
      : process.platform === 'win32'
        ? ['cmd', ['/c', 'start', '', address]]
        : ['xdg-open', [address]];
  if (command === 'xdg-open' && !process.env.DISPLAY && !process.env.WAYLAND_DISPLAY) return;
  const browser = spawn(command, args, { stdio: 'ignore', detached: true });
  browser.on('error', () => {});
  browser.unref();
}

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      workspace: { type: 'string' },
      open: { type: 'string' },
      port: { type: 'string', default: '0' },
      'no-browser': { type: 'boolean', default: false },
    },
  });
  if (values.workspace === undefined) throw new Error('--workspace says which folder is opened');
  const port = Number(values.port);
  if (!Number.isInteger(port) || port < 0 || port > 65535) throw new Error(`--port ${values.port} is no port number`);
  const rig = await startRig({
    build: editorBuild(root, console.log),
    extension: fileURLToPath(new URL('../../../packages/vscode', import.meta.url)),
    workspace: values.workspace,
    port,
    ...(values.open === undefined ? {} : { open: values.open }),
  });
  console.log(`\nOilway in the browser (Chrome, Chromium, Edge or Firefox on this machine):\n\n  ${rig.address}\n`);
  console.log(`It works on the files of ${values.workspace}: what you save there is saved. Ctrl+C ends it.`);
  if (!values['no-browser']) openBrowser(rig.address);
  const end = (): void => {
    void rig.close().then(() => process.exit(0));
  };
  process.once('SIGINT', end);
  process.once('SIGTERM', end);
}

try {
  await main();
} catch (error) {
  if (!(error instanceof Error)) throw error;
  console.error(error instanceof EditorBuildMissing ? error.message : `The rig could not start: ${error.message}`);
  process.exitCode = 1;
}
