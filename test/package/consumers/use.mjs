import assert from 'node:assert/strict';
import {
  DomainError,
  LogNumber,
  originInHull,
  Probability,
  sizingReport,
  smallest,
} from 'hullgauge';
import { dichotomyCount, originInHull as fromRoom } from 'hullgauge/conic';
import { chart } from 'hullgauge/notebook';
import { logSpaced } from 'hullgauge/plan';
import { originInHullExact } from 'hullgauge/precise';
import { logGamma, normalCdf } from 'hullgauge/special';

assert.equal(originInHull({ n: 10, d: 3 }).value, 0.91015625);
assert.equal(fromRoom, originInHull); // one copy across subpaths
assert.equal(smallest(originInHull, 'n', { d: 40 }, 0.5).value, 80);
assert.equal(dichotomyCount({ n: 4, d: 2 }).value, 14);
assert.ok(normalCdf(-40).log < -800);
assert.deepEqual(logSpaced(1, 10, 1), [1, 10]);
assert.throws(() => logGamma(-1), DomainError); // one class across subpaths
assert.equal(DomainError.name, 'DomainError');
assert.equal(Probability.name, 'Probability');
assert.equal(LogNumber.name, 'LogNumber');
assert.ok(normalCdf(0) instanceof Probability);
assert.match(String(sizingReport({ d: 3 })), /surround/);
assert.equal(String(originInHullExact({ n: 10, d: 3 })), '233/256');
assert.equal(originInHullExact({ n: 10, d: 3 }).toDecimal(4).toString(), '0.9102');
assert.match(chart(originInHull, { x: { n: [9, 10] }, args: { d: 3 } }).$schema, /vega-lite.v5/);
