import { USUAL_LIGHT } from './schema.ts';

/** For each old version, the function that lifts a study to the next one. */
export type Migrations = Readonly<Record<number, (raw: Record<string, unknown>) => unknown>>;

export const MIGRATIONS: Migrations = {
  /** The look names its colour map and its light. */
  1: (raw) => ({
    ...raw,
    version: 2,
    look: { ...(raw.look as object), colourMap: 'harbour', light: USUAL_LIGHT },
  }),
};
