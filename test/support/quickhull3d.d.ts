/** The bundle of the convex-hull program: its module sources leave out file extensions. */
declare module 'quickhull3d/dist/quickhull3d.js' {
  export default function quickhull(points: readonly (readonly number[])[]): number[][];
}
