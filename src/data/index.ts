/**
 * Questions about the user's own points, with certificates, and seeded simulation.
 *
 * @module
 */
export { hullVertices } from './hull-vertices.ts';
export {
  type HullMembership,
  type HullWeight,
  type InHullOptions,
  inHull,
  type Separator,
} from './in-hull.ts';
export {
  InterpolationAudit,
  type InterpolationAuditFields,
  type InterpolationAuditOptions,
  interpolationAudit,
} from './interpolation-audit.ts';
export type { LongWorkOptions } from './long-work.ts';
export type { Points } from './points.ts';
export { type SamplerOptions, sampler } from './sampler.ts';
export { type Separability, type SeparableOptions, separable } from './separable.ts';
export {
  type SimulatedEvent,
  type SimulateOptions,
  type Simulation,
  simulate,
} from './simulate.ts';
