/** One seed for all property tests, so that a failing run can be run again; `OILWAY_SEED=7 npx vitest run ...` tries another. */
import fc from 'fast-check';

fc.configureGlobal({ seed: Number(process.env.OILWAY_SEED ?? 20_261) });
