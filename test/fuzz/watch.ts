/**
 * The clock of a long run: ends it in time, and ends the process where one call takes over two minutes,
 * with the number of the call. The short run of the suite has no clock.
 */
import process from 'node:process';
import { Worker } from 'node:worker_threads';

/** Longest a single call may take, in seconds. */
const PATIENCE = 120;

/** What a run asks before each call. */
export interface Watch {
  readonly goesOn: (index: number) => boolean;
  readonly stop: () => Promise<unknown>;
}

/** Starts the clock. */
export function watch(seed: number, minutes: number): Watch {
  const current = new Int32Array(new SharedArrayBuffer(4));
  const worker = new Worker(WATCHMAN, {
    eval: true,
    workerData: { current, seed, patience: PATIENCE, pid: process.pid },
  });
  const end = performance.now() + minutes * 60_000;
  return {
    goesOn: (index) => {
      Atomics.store(current, 0, index);
      return performance.now() < end;
    },
    stop: () => worker.terminate(),
  };
}

// Source text: a worker takes no TypeScript on Node 20.
const WATCHMAN = `
const { workerData: { current, seed, patience, pid } } = require('node:worker_threads');
const { writeSync } = require('node:fs');
let last = -1;
setInterval(() => {
  const index = Atomics.load(current, 0);
  if (index === last) {
    writeSync(2, 'seed ' + seed + ', call ' + index + ': over ' + patience + ' s\\n');
    process.kill(pid);
  }
  last = index;
}, patience * 1000);
`;
