/**
 * Generated tests repeat exactly from run to run; HULLGAUGE_SEED explores other arguments.
 */
import process from 'node:process';
import fc from 'fast-check';

fc.configureGlobal({ seed: Number(process.env['HULLGAUGE_SEED'] ?? 20261201) });
