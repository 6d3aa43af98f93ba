/**
 * Walks the export list: each function refuses each bad argument with a DomainError that names it, and
 * an export without a row in bad-input.ts fails.
 */
import { describe, expect, it } from 'vitest';
import { rooms } from '../../tsup.config.ts';
import { calls, type OptionsCall, type PositionalCall } from './bad-input.ts';

const BAD = [Number.NaN, '3', null, {}, [], () => 1, 3n, Symbol.iterator];
const BAD_PRIMITIVES = [Number.NaN, '3', null, 3n];

/** The exported functions by name, from the root and every room. */
async function exportedFunctions(): Promise<ReadonlyMap<string, (...args: unknown[]) => unknown>> {
  const found = new Map<string, (...args: unknown[]) => unknown>();
  for (const name of ['index', ...rooms]) {
    const file = name === 'index' ? '../../src/index.ts' : `../../src/${name}/index.ts`;
    const module = (await import(file)) as Record<string, unknown>;
    for (const [key, value] of Object.entries(module)) {
      if (typeof value === 'function') found.set(key, value as (...args: unknown[]) => unknown);
    }
  }
  return found;
}

/** The parameter that a call is refused for; asynchronous refusals count too. */
async function refusedFor(call: () => unknown): Promise<string> {
  try {
    const result = call();
    if (result instanceof Promise) await result;
  } catch (error) {
    const { code, parameter, message } = error as {
      code?: string;
      parameter: string;
      message: string;
    };
    if (code !== 'HULLGAUGE_DOMAIN') return `${String(error)} instead of a DomainError`;
    expect(message).toMatch(/^[\w.]+: .+ must be .+, got /);
    return parameter;
  }
  return 'accepted';
}

/** The bad values that a parameter has to refuse. */
function badFor(call: OptionsCall | PositionalCall, name: string): readonly unknown[] {
  const bad: unknown[] = call.structured?.includes(name) ? [...BAD_PRIMITIVES] : [...BAD];
  if (!call.optional?.includes(name)) bad.push(undefined);
  if (call.texts?.includes(name)) bad[bad.indexOf('3')] = 'three';
  if (call.integers?.includes(name)) {
    bad.push(3.5, -1);
    const welcome = 'takes2to53' in call || ('counts' in call && call.counts?.includes(name));
    if (!welcome) bad.push(2 ** 53);
  }
  return bad;
}

const functions = await exportedFunctions();

it('every exported function has a row', () => {
  expect([...functions.keys()].filter((name) => !(name in calls))).toEqual([]);
  expect(Object.keys(calls).filter((name) => !functions.has(name))).toEqual([]);
});

describe('refuses bad arguments', () => {
  const rows = Object.entries(calls).filter(
    ([name, call]) => functions.has(name) && !('skip' in call),
  );
  it.each(rows)('%s', async (name, row) => {
    const fn = functions.get(name) as (...args: unknown[]) => unknown;
    const call = row as OptionsCall | PositionalCall;
    if ('options' in call) {
      expect(await refusedFor(() => fn(call.options))).toBe('accepted');
      for (const parameter of Object.keys(call.options)) {
        for (const value of badFor(call, parameter)) {
          const refused = await refusedFor(() => fn({ ...call.options, [parameter]: value }));
          expect(`${String(value)}: ${refused}`).toMatch(new RegExp(`: ${parameter}\\b`));
        }
      }
      expect(await refusedFor(() => fn({ ...call.options, dimensions: 3 }))).toBe('dimensions');
      for (const value of [undefined, null, 3, 'n', [1]]) {
        expect(await refusedFor(() => fn(value))).toBe('options');
      }
    } else {
      expect(await refusedFor(() => fn(...call.args))).toBe('accepted');
      for (const [index, parameter] of call.names.entries()) {
        for (const value of badFor(call, parameter)) {
          const args = call.args.map((arg, i) => (i === index ? value : arg));
          // Also with the defaults of all that may be left out behind it.
          const later = call.names.slice(index + 1);
          const least = later.every((name) => call.optional?.includes(name))
            ? index + 1
            : args.length;
          for (const given of new Set([args.length, least])) {
            const refused = await refusedFor(() => fn(...args.slice(0, given)));
            expect(`${String(value)}: ${refused}`).toMatch(new RegExp(`: ${parameter}\\b`));
          }
        }
      }
    }
  });
});
