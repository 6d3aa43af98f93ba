/**
 * An invented scenario: a soil survey measures 12 properties at each of 40 planned sites, and the
 * analyst asks, before anyone drives out, what such a sample will cover.
 *
 * Run it with `npm start`.
 */
import { sizingReport } from 'hullgauge';

console.log('Invented scenario: a soil survey of 12 properties at 40 planned sites.\n');
const report = sizingReport({ d: 12, n: 40 });
console.log(String(report));
console.log(`
The numbers hold under the assumptions named in each block. They do not replace a safety review or the
practice and codes that apply.`);
