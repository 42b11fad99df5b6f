/** Where the browser is: OILWAY_CHROMIUM in the environment, or the usual places of a Linux system. */
import { existsSync } from 'node:fs';

const PLACES = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome-stable', '/usr/bin/google-chrome'];

export function chromiumPath(): string {
  const named = process.env.OILWAY_CHROMIUM;
  if (named !== undefined && named !== '') return named;
  const found = PLACES.find((place) => existsSync(place));
  if (found === undefined) {
    throw new Error(
      'No Chromium found. On Debian: apt-get install -y chromium. Elsewhere: set OILWAY_CHROMIUM to the path of the browser.',
    );
  }
  return found;
}
