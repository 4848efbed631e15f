import fc from 'fast-check';
import { expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { type Cosmology, createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const parameters: fc.Arbitrary<CosmologyParameters> = fc.record({
  h0KmSMpc: between(20, 200),
  omegaM0: between(0, 2),
  omegaDe0: fc.oneof(fc.constant('flat' as const), between(-0.5, 1.5)),
  w0: between(-2, 0),
  wa: between(-2, 1),
  tCmbK: fc.oneof(fc.constant(0), between(1, 4)),
  nEff: between(3, 5),
  neutrinoMassesEv: fc.array(between(0, 1), { maxLength: 3 }),
});

/** Runs `check` on universes; parameters that make none must be refused with one sentence. */
function forUniverses(check: (cosmology: Cosmology, z: number, further: number) => void): void {
  let universes = 0;
  fc.assert(
    fc.property(parameters, between(1e-6, 30), between(1e-3, 30), (given, z, step) => {
      let cosmology: Cosmology;
      try {
        cosmology = createCosmology(given);
      } catch (error) {
        expect(error).toBeInstanceOf(Refusal);
        expect((error as Refusal).message).toMatch(/no big bang/);
        return;
      }
      universes++;
      check(cosmology, z, z + step);
    }),
    { numRuns: 200, seed: 20260 },
  );
  expect(universes).toBeGreaterThan(100);
}

it('distance, time and volume rise with z, age falls', () => {
  forUniverses((cosmology, z, further) => {
    expect(cosmology.comovingMpc(further)).toBeGreaterThan(cosmology.comovingMpc(z));
    expect(cosmology.lookbackGyr(further)).toBeGreaterThan(cosmology.lookbackGyr(z));
    expect(cosmology.comovingVolumeMpc3(further)).toBeGreaterThan(cosmology.comovingVolumeMpc3(z));
    if (cosmology.ageGyr(0) < Number.POSITIVE_INFINITY)
      expect(cosmology.ageGyr(further)).toBeLessThan(cosmology.ageGyr(z));
  });
});

it('lookback time and age add up to the age today', () => {
  forUniverses((cosmology, z) => {
    const today = cosmology.ageGyr(0);
    if (today === Number.POSITIVE_INFINITY) return;
    expect(Math.abs((cosmology.lookbackGyr(z) + cosmology.ageGyr(z)) / today - 1)).toBeLessThan(1e-12);
  });
});

it('shells add up: from 0 to z, from z further on', () => {
  forUniverses((cosmology, z, further) => {
    const sum = cosmology.comovingVolumeMpc3(z) + cosmology.shellVolumeAllSkyMpc3(z, further);
    expect(Math.abs(sum / cosmology.comovingVolumeMpc3(further) - 1)).toBeLessThan(1e-12);
  });
});

it('a distance read from the table is the distance', () => {
  forUniverses((cosmology, z) => {
    const table = cosmology.table();
    const within = (ours: number, exact: number) =>
      expect(Math.abs(ours / exact - 1)).toBeLessThan(z < 20 ? 1e-9 : 1e-7);
    within(table.comovingMpc(z), cosmology.comovingMpc(z));
    within(table.lookbackGyr(z), cosmology.lookbackGyr(z));
  });
});

it('inverses invert', () => {
  forUniverses((cosmology, z) => {
    const same = (other: number) => expect(Math.abs(other / z - 1)).toBeLessThan(1e-10);
    same(cosmology.redshiftAtComovingMpc(cosmology.comovingMpc(z)));
    same(cosmology.redshiftAtLookbackGyr(cosmology.lookbackGyr(z)));
    same(cosmology.redshiftAtVolumeMpc3(cosmology.comovingVolumeMpc3(z)));
  });
});

it('H0 only sets the scale without radiation: h D and h t stay', () => {
  forUniverses((cosmology, z) => {
    if (cosmology.parameters.tCmbK > 0) return;
    const twice = createCosmology({ ...cosmology.parameters, h0KmSMpc: cosmology.parameters.h0KmSMpc * 2 });
    expect(Math.abs((2 * twice.comovingMpc(z)) / cosmology.comovingMpc(z) - 1)).toBeLessThan(1e-14);
    expect(Math.abs((2 * twice.lookbackGyr(z)) / cosmology.lookbackGyr(z) - 1)).toBeLessThan(1e-14);
  });
});
