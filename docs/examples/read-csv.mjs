/**
 * From a CSV file to an audit: read rows of numbers, find out what they cover, and ask about one case.
 *
 * Run it with `node docs/examples/read-csv.mjs file.csv`; without a file it reads an invented one.
 */
import { readFileSync } from 'node:fs';
import process from 'node:process';
import { hullVertices, inHull, interpolationAudit } from 'hullgauge';

const INVENTED = `site,clay,sand,ph
1,22.1,41.0,6.8
2,18.4,52.3,6.1
3,30.7,33.9,7.2
4,25.0,45.1,6.6
5,12.9,61.8,5.9
6,27.3,38.2,7.0
7,21.5,47.7,6.4
8,16.2,55.0,6.5
9,23.8,44.4,6.7
10,19.9,49.5,6.3
`;

/** Splits simple CSV (no quoted commas) into a header and rows of numbers; an empty cell is NaN. */
function readCsv(text) {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '');
  const cells = lines.map((line) => line.split(',').map((cell) => cell.trim()));
  const [header = [], ...body] = cells;
  const rows = body.map((row) => row.map((cell) => (cell === '' ? Number.NaN : Number(cell))));
  return { header, rows };
}

const file = process.argv[2];
const { header, rows } = readCsv(file === undefined ? INVENTED : readFileSync(file, 'utf8'));
// The first column is the site's number, no measurement.
const names = header.slice(1);
const points = rows.map((row) => row.slice(1));

try {
  console.log(`Columns: ${names.join(', ')}`);
  console.log(String(await interpolationAudit(points)));
  const vertices = await hullVertices(points);
  console.log(`Sites on the edge: ${vertices.map((index) => rows[index][0]).join(', ')}`);
  const means = names.map((_, j) => points.reduce((sum, row) => sum + row[j], 0) / points.length);
  const { position, weights } = inHull(points, means);
  console.log(`The mean site is ${position}, a mixture of ${weights.length} sites.`);
} catch (error) {
  if (error.code !== 'HULLGAUGE_DOMAIN') throw error;
  // A bad cell is named as points[row][column], counted from 0 and without the header.
  const [, row, column] = /^points\[(\d+)\](?:\[(\d+)\])?$/.exec(error.parameter) ?? [];
  const line = row === undefined ? '' : ` (line ${Number(row) + 2} of the file`;
  const name = column === undefined ? '' : `, column ${names[column]}`;
  console.error(`${error.message}${line}${line === '' ? '' : `${name})`}`);
  process.exitCode = 1;
}
