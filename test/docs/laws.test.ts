/** The matrix of docs/guide/laws.md, cell by cell: what it lists is answered, the rest refused by name. */
import { readFileSync } from 'node:fs';
import * as hullgauge from 'hullgauge';
import { describe, expect, it } from 'vitest';

const { gaussian, uniformBall, uniformSphere, betaLaw, betaPrimeLaw, studentT } = hullgauge;
const columns: readonly (readonly hullgauge.Law[])[] = [
  [gaussian()],
  [uniformBall(), uniformSphere()],
  [betaLaw(0.7), betaLaw(-0.5)],
  [betaPrimeLaw(6), studentT({ degreesOfFreedom: 3 })],
];
/** What each function takes beside the law and the hull. */
const others: Readonly<Record<string, object>> = {
  pointInHull: { n: 20, d: 4, mahalanobisDistance: 1 },
  queriesInHull: { n: 20, d: 4, mahalanobisDistances: [1, 2] },
  expectedFaces: { n: 20, d: 4, k: 1 },
  expectedFacetsBelow: { n: 20, d: 4, height: 0.3 },
  hullIntrinsicVolumeRatio: { n: 20, d: 4, k: 2 },
  expectedHullIntrinsicVolume: { n: 20, d: 4, k: 2 },
  hausdorffWithin: { n: 200, d: 4, distance: 0.3 },
  approxVolumeThreshold: { d: 4 },
  simplexVolume: { d: 4 },
  capProbability: { d: 4, height: 0.3 },
};
const withoutLaw = ['pointInHull', 'queriesInHull'];

const page = readFileSync(new URL('../../docs/guide/laws.md', import.meta.url), 'utf8');
const table = page.slice(page.indexOf('<!-- table'), page.indexOf('## Which law'));
const rows = [...table.matchAll(/^\| `(\w+)`(.*?) \| (.*?) \| (.*?) \| (.*?) \| (.*?) \|$/gm)].map(
  (match) => match.slice(1),
);

function answers(name: string, remark: string, law: hullgauge.Law, hull: string): boolean {
  if (withoutLaw.includes(name) && law.family !== 'gaussian') return false;
  const args = {
    ...(others[name] ?? { n: 20, d: 4 }),
    ...(remark.includes('queryScale') ? { queryScale: 0.5 } : {}),
    ...(remark.includes('d - 1') ? { k: 3 } : {}),
    ...(withoutLaw.includes(name) ? {} : { law }),
    ...(hull === 'plain' ? {} : { hull }),
  };
  const ask = (hullgauge as unknown as Record<string, (...args: unknown[]) => unknown>)[name];
  try {
    if (name === 'sampler' && hull === 'plain') ask?.(law, { d: 4, seed: 1 });
    else ask?.(args);
    return ask !== undefined;
  } catch (error) {
    if (!(error instanceof hullgauge.DomainError)) throw error;
    return false;
  }
}

describe('the matrix of laws, hulls and functions', () => {
  it('has a row for every function of the front door that takes a hull', () => {
    expect(rows).toHaveLength(20);
  });

  it.each(rows)('%s%s', (name = '', remark = '', ...cells) => {
    const found = columns.map((laws) =>
      laws.map((law) => {
        const hulls = ['plain', 'symmetric', 'withCentre'].filter((hull) =>
          answers(name, remark, law, hull),
        );
        return hulls.length === 0 ? 'no' : hulls.join(', ');
      }),
    );
    expect(found).toEqual(cells.map((cell, i) => columns[i]?.map(() => cell)));
  });
});
