/**
 * Convex hulls of random points at finite n and d: volume, facets, heights, faces, membership.
 *
 * @module
 */
export {};
