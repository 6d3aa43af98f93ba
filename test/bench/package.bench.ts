/** Cold import of the build: a new process each time, so nothing is compiled or cached by Node. */
import { execFileSync } from 'node:child_process';
import { createRequire } from 'node:module';
import { pathToFileURL } from 'node:url';
import { printRows } from './measure.ts';

/** Processes a figure. */
const PROCESSES = 10;

function median(measure: () => number): number {
  const times = Array.from({ length: PROCESSES }, measure).sort((a, b) => a - b);
  return 1e6 * (times[PROCESSES >> 1] as number);
}

/** Nanoseconds that `import(file)` takes in a fresh process. */
function coldImport(file: string): number {
  const code = `const start = performance.now();
    await import(${JSON.stringify(file)});
    console.log(performance.now() - start);`;
  const args = ['--input-type=module', '--eval', code];
  return median(() => Number(execFileSync(process.execPath, args)));
}

/** The root, beside the start of the process itself and the general statistics package. */
export function benchImport(): void {
  const jstat = pathToFileURL(createRequire(import.meta.url).resolve('jstat')).href;
  const start = median(() => {
    const before = performance.now();
    execFileSync(process.execPath, ['--eval', '0']);
    return performance.now() - before;
  });
  printRows('Cold import in a fresh process, median of ten', [
    {
      name: "import 'hullgauge'",
      own: coldImport(new URL('../../dist/index.js', import.meta.url).href),
      others: { 'start of Node itself': start, 'import of jstat': coldImport(jstat) },
    },
  ]);
}
