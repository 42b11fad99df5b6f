// `npm run editor`: the editor in the browser, with the samples, until Ctrl+C. Options go on to the rig (--port N, --no-browser).
import { build } from './parts/build.mjs';
import { install } from './parts/install.mjs';
import { ROOT } from './parts/places.mjs';
import { openWeb } from './parts/web.mjs';

process.on('SIGINT', () => {});
try {
  install(ROOT);
  build();
  await openWeb(process.argv.slice(2));
} catch (error) {
  console.error(`\n${error.message}`);
  process.exitCode = 1;
}
