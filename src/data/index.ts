/**
 * Questions about the user's own points, with certificates, and seeded simulation.
 *
 * @module
 */
export {};
