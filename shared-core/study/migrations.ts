/** For each old version, the function that lifts a study to the next one. */
export type Migrations = Readonly<Record<number, (raw: Record<string, unknown>) => unknown>>;

/** Version 1 is the first that was ever saved, so there is nothing to lift yet. */
export const MIGRATIONS: Migrations = {};
