/**
 * Sizing: the smallest or largest argument at which a question reaches a target, and reports.
 *
 * @module
 */
export {};
