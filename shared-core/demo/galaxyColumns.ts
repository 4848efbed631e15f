/** Measured galaxies; arrays of one length. */
export interface GalaxyColumns {
  readonly raDeg: Float64Array;
  readonly decDeg: Float64Array;
  readonly redshift: Float64Array;
  readonly magnitude: Float64Array;
  readonly colour: Float64Array;
  /** One over the probability that the galaxy's redshift was measured. */
  readonly weight: Float64Array;
}

export function createGalaxyColumns(length: number): GalaxyColumns {
  const column = () => new Float64Array(length);
  return {
    raDeg: column(),
    decDeg: column(),
    redshift: column(),
    magnitude: column(),
    colour: column(),
    weight: column(),
  };
}
