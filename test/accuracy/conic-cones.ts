/** Accuracy of cones, of their meeting probabilities, of arrangements and of random cones. */
import {
  arrangementFaces,
  arrangementRegions,
  type Cone,
  circularCone,
  coneMeetsSubspace,
  conesMeet,
  coverEfronCone,
  linfDescentCone,
  orthant,
  polyhedralCone,
  schlaefliCone,
  weylChamber,
} from 'hullgauge/conic';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { probabilityChecks } from '../support/probability-checks.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

const table = readTable<NamedRow>('conic');
const extra = readTable<NamedRow>('conic-extra');

/** Rows of a quantity in both tables, as cases of the value or the logarithm. */
function cases(
  quantity: string,
  field: 'value' | 'log',
  region: (args: NamedRow['args']) => string = () => 'all',
): readonly AccuracyCase[] {
  return [...table, ...extra].flatMap((row) => {
    const exact = row[field];
    if (row.quantity !== quantity || exact === null) return [];
    return [{ args: [row.args], exact, region: region(row.args) }];
  });
}

const number = (args: NamedRow['args'], name: string): number => Number(args[name]);

/** `pi/6` means the real number; the double nearest to it is what a program can pass. */
function angleOf(args: NamedRow['args']): number {
  const text = String(args['alpha'] ?? args['angle']);
  return text.startsWith('pi/') ? Math.PI / Number(text.slice(3)) : Number(text);
}

const weyl = (args: NamedRow['args']): Cone =>
  weylChamber(args['type'] as 'A' | 'B' | 'D', number(args, 'n'));
const circular = (args: NamedRow['args']): Cone => circularCone(number(args, 'n'), angleOf(args));
const rays = (args: NamedRow['args']): Cone =>
  polyhedralCone((args['rays'] ?? args['generators']) as number[][]);

/** Checks of log v_k of one family, and of the volumes themselves. */
function volumeChecks(
  name: string,
  quantity: string,
  cone: (args: NamedRow['args']) => Cone,
  bound: number,
): readonly AccuracyCheck[] {
  return [
    {
      name: `${name}.logIntrinsicVolumes`,
      cases: cases(quantity, 'log'),
      compute: (args: NamedRow['args']) =>
        cone(args).logIntrinsicVolumes[number(args, 'k')] as number,
      measure: 'log',
      bound,
    },
    {
      name: `${name}.intrinsicVolumes`,
      cases: cases(quantity, 'value').filter(({ exact }) => Number(exact) > 1e-290),
      compute: (args: NamedRow['args']) => cone(args).intrinsicVolumes[number(args, 'k')] as number,
      measure: 'relative',
      bound,
      scale: ({ exact }) => Math.max(1, Math.abs(Math.log(Number(exact)))),
    },
  ];
}

const moment = (
  name: string,
  quantity: string,
  compute: (args: NamedRow['args']) => number,
  bound: number,
): AccuracyCheck => ({
  name,
  cases: cases(quantity, 'value'),
  compute,
  measure: 'relative',
  bound,
});

/** The cone that a row of the kinematic tables names, such as `circular n=1000 alpha=pi/6`. */
function namedCone(text: unknown): Cone {
  const parts = /^(orthant|weyl|circular)(?: ([ABD]))? n=(\d+)(?: alpha=pi\/(\d+))?$/.exec(
    String(text),
  );
  if (parts === null) throw new Error(`unknown cone ${String(text)}`);
  const n = Number(parts[3]);
  if (parts[1] === 'orthant') return orthant(n);
  if (parts[1] === 'weyl') return weylChamber(parts[2] as 'A' | 'B' | 'D', n);
  return circularCone(n, Math.PI / Number(parts[4]));
}

const meetingRows = (quantity: string) =>
  table.flatMap((row) =>
    row.quantity === quantity && row.value !== null
      ? [{ args: row.args, value: row.value, log: row.log, region: 'all' }]
      : [],
  );

export const coneChecks: readonly AccuracyCheck[] = [
  ...volumeChecks('orthant', 'orthant', (args) => orthant(number(args, 'n')), 3e-15),
  ...volumeChecks('weylChamber', 'civ.weyl', weyl, 3e-15),
  moment(
    'weylChamber.statisticalDimension',
    'civ.weyl.statdim',
    (a) => weyl(a).statisticalDimension,
    4e-15,
  ),
  moment('weylChamber.variance', 'civ.weyl.variance', (a) => weyl(a).variance, 4e-15),
  ...volumeChecks('circularCone', 'civ.circular', circular, 3e-15),
  ...volumeChecks('circularCone (extra)', 'circular', circular, 3e-15),
  moment(
    'circularCone.statisticalDimension',
    'civ.circular.statdim',
    (a) => circular(a).statisticalDimension,
    4e-15,
  ),
  moment('circularCone.variance', 'civ.circular.variance', (a) => circular(a).variance, 4e-15),
  ...volumeChecks('polyhedralCone (span 3)', 'civ.cone_R3', rays, 2e-15),
  ...volumeChecks('polyhedralCone (span 4)', 'civ.cone_R4', rays, 2e-15),
  ...probabilityChecks(
    'conesMeet',
    meetingRows('kinematic.intersect'),
    (args: NamedRow['args']) => conesMeet(namedCone(args['C']), namedCone(args['K'])),
    4e-15,
  ),
  ...probabilityChecks(
    'coneMeetsSubspace',
    meetingRows('crofton.hit'),
    (args: NamedRow['args']) =>
      coneMeetsSubspace(namedCone(args['C']), { codimension: number(args, 'codim') }),
    4e-15,
  ),
  {
    name: 'coneMeetsSubspace(linfDescentCone).complement',
    cases: cases('recovery.linf_success', 'value'),
    compute: (args: NamedRow['args']) =>
      coneMeetsSubspace(linfDescentCone({ n: number(args, 'n'), saturated: number(args, 'k') }), {
        codimension: number(args, 'm'),
      }).complement,
    measure: 'relative',
    bound: 4e-15,
  },
];

const counted = (args: NamedRow['args']) => ({ n: number(args, 'n'), d: number(args, 'd') });

const countCheck = (
  name: string,
  quantity: string,
  count: (args: NamedRow['args']) => number,
): AccuracyCheck => ({
  name,
  cases: cases(quantity, 'value'),
  compute: count,
  measure: 'relative',
  // below 2^52 counts are exact
  bound: 0,
});

export const arrangementChecks: readonly AccuracyCheck[] = [
  countCheck(
    'arrangementRegions',
    'arrangement.affine_regions',
    (a) => arrangementRegions(counted(a)).value,
  ),
  countCheck(
    'arrangementRegions (bounded)',
    'arrangement.affine_bounded_regions',
    (a) => arrangementRegions({ ...counted(a), bounded: true }).value,
  ),
  countCheck(
    'arrangementRegions (central)',
    'arrangement.central_regions',
    (a) => arrangementRegions({ ...counted(a), central: true }).value,
  ),
  countCheck(
    'arrangementFaces',
    'arrangement.affine_faces',
    (a) => arrangementFaces({ ...counted(a), k: number(a, 'k') }).value,
  ),
  countCheck(
    'arrangementFaces (central)',
    'arrangement.central_faces',
    (a) => arrangementFaces({ ...counted(a), k: number(a, 'k'), central: true }).value,
  ),
];

const size = ({ args }: AccuracyCase): string =>
  (args[0] as { n: number }).n < 1e4 ? 'n < 1e4' : 'beyond';
const logCheck = (
  name: string,
  quantity: string,
  compute: (args: NamedRow['args']) => number,
): AccuracyCheck => ({
  name,
  cases: cases(quantity, 'log').map((testCase) => ({ ...testCase, region: size(testCase) })),
  compute,
  measure: 'log',
  bound: 4e-15,
});
const schlaefliFaces = (args: NamedRow['args']): number =>
  schlaefliCone(counted(args)).expectedFaces(number(args, 'k')).log;
const coverEfronFaces = (args: NamedRow['args']): number =>
  coverEfronCone(counted(args)).expectedFaces(number(args, 'k')).log;
const schlaefliVolume = (args: NamedRow['args']): number =>
  schlaefliCone(counted(args)).logExpectedIntrinsicVolumes[number(args, 'k')] as number;

export const randomConeChecks: readonly AccuracyCheck[] = [
  logCheck('schlaefliCone.expectedFaces', 'random_cone.schlaefli_E_faces', schlaefliFaces),
  logCheck('schlaefliCone.expectedFaces (extra)', 'schlaefli.f', schlaefliFaces),
  logCheck(
    'schlaefliCone.logExpectedIntrinsicVolumes',
    'random_cone.schlaefli_E_v',
    schlaefliVolume,
  ),
  logCheck('schlaefliCone.logExpectedIntrinsicVolumes (extra)', 'schlaefli.v', schlaefliVolume),
  moment(
    'schlaefliCone.statisticalDimension',
    'random_cone.schlaefli_E_statdim',
    (a) => schlaefliCone(counted(a)).statisticalDimension,
    4e-15,
  ),
  logCheck('coverEfronCone.expectedFaces', 'random_cone.cover_efron_E_faces', coverEfronFaces),
  logCheck('coverEfronCone.expectedFaces (extra)', 'coverEfron.f', coverEfronFaces),
  moment(
    'coverEfronCone.solidAngle',
    'random_cone.cover_efron_E_solid_angle',
    (a) => coverEfronCone(counted(a)).solidAngle,
    4e-15,
  ),
];
