#!/usr/bin/env node
/** Starts the bundled command; in a checkout the bundle is made first where it is missing or older than its sources. */
import { pathToFileURL } from 'node:url';
import { BUNDLE, build, stale } from '../build.mjs';

const major = Number(process.versions.node.split('.')[0]);
if (major < 20) {
  console.error(`oilway: needs Node 20 or newer, this is ${process.versions.node}`);
  process.exitCode = 2;
} else if (await ready()) {
  await import(pathToFileURL(BUNDLE).href);
} else process.exitCode = 2;

/** Sees to it that there is an up-to-date bundle. */
async function ready() {
  try {
    if (stale()) await build();
    return true;
  } catch (error) {
    console.error('oilway: the command could not be built: run "npm install" in the checkout and try again');
    console.error(error instanceof Error ? error.message : error);
    return false;
  }
}
