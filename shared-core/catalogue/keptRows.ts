import type { Catalogue, ColumnMapping } from './catalogue.ts';
import { DEC, RA, WEIGHT } from './cleaning.ts';
import { NumberColumn } from './numberColumn.ts';
import { findRepeats } from './positions.ts';
import type { Tally } from './tally.ts';

/** The rows kept so far, column by column. A file's column that plays two parts is held once. */
export class KeptRows {
  readonly #mapping: ColumnMapping;
  readonly #extras: readonly string[];
  readonly #line = new NumberColumn();
  readonly #ra = new NumberColumn();
  readonly #dec = new NumberColumn();
  readonly #redshift = new NumberColumn();
  readonly #weight: NumberColumn | null;
  /** Magnitude and extras, as far as they are none of the columns above. */
  readonly #further: { readonly name: string; readonly place: number; readonly values: NumberColumn }[] = [];

  /** `placeOf` tells where among a row's values the column of this name stands. */
  constructor(mapping: ColumnMapping, extras: readonly string[], placeOf: (name: string) => number) {
    this.#mapping = mapping;
    this.#extras = extras;
    this.#weight = mapping.weight === null ? null : new NumberColumn();
    const held = new Set([mapping.ra, mapping.dec, mapping.weight]);
    if (mapping.radial.kind === 'redshift') held.add(mapping.radial.column);
    for (const name of [mapping.magnitude, ...extras]) {
      if (name === null || held.has(name)) continue;
      held.add(name);
      this.#further.push({ name, place: placeOf(name), values: new NumberColumn() });
    }
  }

  add(line: number, redshift: number, values: Float64Array): void {
    this.#line.push(line);
    this.#ra.push(values[RA]!);
    this.#dec.push(values[DEC]!);
    this.#redshift.push(redshift);
    this.#weight?.push(values[WEIGHT]!);
    for (let k = 0; k < this.#further.length; k++) {
      const column = this.#further[k]!;
      column.values.push(values[column.place]!);
    }
  }

  /** Everything kept, as a catalogue; nothing is left here afterwards. */
  catalogue(tally: Tally): Catalogue {
    const { ra, dec, radial, weight, magnitude } = this.#mapping;
    const byName = new Map<string, Float64Array>();
    const raDeg = this.#ra.join();
    const decDeg = this.#dec.join();
    const redshift = this.#redshift.join();
    const weights = this.#weight?.join() ?? null;
    byName.set(ra, raDeg).set(dec, decDeg);
    if (radial.kind === 'redshift') byName.set(radial.column, redshift);
    if (weight !== null && weights !== null) byName.set(weight, weights);
    for (const { name, values } of this.#further) byName.set(name, values.join());
    return {
      account: tally.account(findRepeats(raDeg, decDeg).row.length),
      raDeg,
      decDeg,
      redshift,
      weight: weights,
      magnitude: magnitude === null ? null : byName.get(magnitude)!,
      extras: new Map(this.#extras.map((name) => [name, byName.get(name)!])),
      line: this.#line.join(),
    };
  }
}
