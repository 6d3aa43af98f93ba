/**
 * Long work in slices: it reports progress, can be called off and gives way to the event loop.
 *
 * The library reads no clock, so slices are measured in operations: about 8 million
 * multiplications and additions, which take some tens of milliseconds.
 */
import { DomainError } from '../domain.ts';

/** What all long-running functions take. */
export interface LongWorkOptions {
  /** Called after each slice and at the end with the work done and the whole. */
  readonly onProgress?: (done: number, total: number) => void;
  /** The work stops with an error soon after `aborted` turns true; an `AbortSignal` will do. */
  readonly signal?: {
    /** Whether to stop. */
    readonly aborted: boolean;
  };
}

/** Operations in a slice. */
export const SLICE = 8e6;

/** Cuts one call's work into slices. */
export interface Pace {
  /** Counts operations; true when it is time to `pause`. */
  spend(operations: number): boolean;
  /** Reports, gives way, and throws if the work was called off. */
  pause(done: number): Promise<void>;
  /** Reports the end. */
  finish(): void;
}

/** Checks the options of a long-running function and starts its pace. */
export function startPace(fn: string, total: number, options: LongWorkOptions): Pace {
  const { onProgress, signal } = options;
  if (onProgress !== undefined && typeof onProgress !== 'function') {
    throw new DomainError(fn, 'onProgress', 'a function', onProgress);
  }
  if (
    signal !== undefined &&
    (typeof signal !== 'object' || signal === null || typeof signal.aborted !== 'boolean')
  ) {
    throw new DomainError(fn, 'signal', 'an object with a boolean aborted', signal);
  }
  const throwIfAborted = (done: number): void => {
    if (signal?.aborted !== true) return;
    const error = new Error(`${fn}: aborted after ${done} of ${total}`);
    error.name = 'AbortError';
    throw error;
  };
  throwIfAborted(0);
  let spent = 0;
  return {
    spend(operations) {
      spent += operations;
      return spent >= SLICE;
    },
    async pause(done) {
      spent = 0;
      onProgress?.(done, total);
      await giveWay();
      throwIfAborted(done);
    },
    finish() {
      onProgress?.(total, total);
    },
  };
}

/** What Node, Deno, Bun and browsers offer to let other tasks run; declared here, since src knows no host. */
interface Host {
  readonly setImmediate?: (task: () => void) => unknown;
  readonly MessageChannel?: new () => {
    readonly port1: { onmessage: (() => void) | null; close(): void };
    readonly port2: { postMessage(message: null): void };
  };
  readonly setTimeout?: (task: () => void, delay: number) => unknown;
}

/** Resolves after other tasks had their turn: a timer, a click, an abort. */
function giveWay(): Promise<void> {
  const host = globalThis as unknown as Host;
  return new Promise((resolve) => {
    if (host.setImmediate !== undefined) {
      host.setImmediate(resolve);
    } else if (host.MessageChannel !== undefined) {
      // Browsers delay repeated timers by 4 ms, messages by nothing.
      const { port1, port2 } = new host.MessageChannel();
      port1.onmessage = () => {
        port1.close();
        resolve();
      };
      port2.postMessage(null);
    } else if (host.setTimeout !== undefined) {
      host.setTimeout(resolve, 0);
    } else {
      resolve();
    }
  });
}
