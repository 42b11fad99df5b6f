// `npm start`: installs what is missing, builds, checks and runs a sample in the terminal, then opens it in an editor until Ctrl+C.
//   -- --web        the editor in the browser, even if there is a VS Code on the PATH
//   -- --no-editor  the terminal part only (also where the output is no terminal)
import { build } from './parts/build.mjs';
import { findDesktop, openDesktop } from './parts/desktop.mjs';
import { install } from './parts/install.mjs';
import { ROOT } from './parts/places.mjs';
import { showInTerminal } from './parts/terminal.mjs';
import { openWeb } from './parts/web.mjs';

async function openEditor(web) {
  if (web) return await openWeb();
  const desktop = findDesktop();
  if (desktop.version) return await openDesktop(desktop.version);
  console.log(`\nOpening the editor in the browser (${desktop.why}).`);
  return await openWeb();
}

async function main(args) {
  const unknown = args.find((arg) => arg !== '--web' && arg !== '--no-editor');
  if (unknown) throw new Error(`Unknown option ${unknown}. There are --web and --no-editor.`);
  const editor = process.stdout.isTTY && !args.includes('--no-editor');
  install(ROOT);
  build();
  showInTerminal();
  if (editor) await openEditor(args.includes('--web'));
}

// The editor gets the interrupt too and closes; this process waits for it and then ends without complaint.
process.on('SIGINT', () => {});
try {
  await main(process.argv.slice(2));
} catch (error) {
  console.error(`\n${error.message}`);
  process.exitCode = 1;
}
