import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Catalogue } from '../../shared-core/catalogue/catalogue.ts';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';
import { type Preview, previewCatalogue } from '../../shared-core/catalogue/preview.ts';
import { select } from '../../shared-core/catalogue/select.ts';
import { setAsideCsv } from '../../shared-core/catalogue/setAsideCsv.ts';
import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { cos, sin } from '../../shared-core/numerics/elementary/elementary.ts';
import { localDensity } from '../../shared-core/shells/localDensity.ts';
import { type SortedSample, sortSample } from '../../shared-core/shells/sample.ts';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import { estimateFootprint } from '../../shared-core/sky/estimate.ts';
import { footprintFields } from '../../shared-core/sky/fields.ts';
import type { Footprint } from '../../shared-core/sky/region.ts';
import { columnRows, type NamedColumn } from './columnRows.ts';
import { loadKey } from './loadKey.ts';
import type { EngineEvent, EngineSource, FootprintPicture, GalaxyRow, Stage, Wanted } from './protocol.ts';
import { sourceBytes, startSha256 } from './sourceBytes.ts';

/** What the desk needs of its surroundings: a thread in the window, plain objects in a test. */
export interface Surroundings {
  readonly emit: (event: EngineEvent) => void;
  /** `signal` ends it, also while nothing comes (a disk that sleeps, a network that stalls). */
  readonly openUrl: (url: string, signal?: AbortSignal) => Promise<AsyncIterable<Uint8Array>>;
  /** Shared memory where the host allows it, plain memory elsewhere. */
  readonly floats: (length: number) => Float32Array;
  /** The same for the sample: in shared memory it reaches the page without being copied there. */
  readonly share: (sample: SortedSample) => SortedSample;
  /** Lets waiting messages in, so that a newer wish can stop this one. */
  readonly breathe: () => Promise<void>;
}

/**
 * Up to so many galaxies the old catalogue stays in memory while another is read, so that giving the reading up has
 * it back at once; a larger one makes room, and is read again. Two million rows of eight numbers are 128 MB.
 */
const MOST_KEPT = 2_000_000;

/** The latest wish changed while a stage ran: its result is not wanted any more. */
class Superseded extends Error {}

/**
 * Catalogue work in stages, each redone only when what it depends on changed:
 * load (source, mapping, cut columns) -> select (region, cuts) -> background (cosmology) -> density (cosmology);
 * columns (of the colours) rests on select alone.
 */
export class EngineDesk {
  readonly #around: Surroundings;
  #wanted: Wanted | null = null;
  #serial = 0;
  #running = false;
  #reading = new AbortController();
  /** Of columns alone. */
  #lookingUp = new AbortController();
  #keys: Partial<Record<Stage, string>> = {};
  #catalogue: Catalogue | null = null;
  /** Of the bytes that the catalogue was read from. */
  #sha256 = '';
  #sample: SortedSample | null = null;
  /** Columns of all rows of the catalogue, kept while something is coloured by them. */
  #columns: readonly NamedColumn[] = [];
  /** How often each stage ran: what a test asks to see that nothing is done twice. */
  readonly runs: Record<Stage, number> = { load: 0, select: 0, background: 0, density: 0, columns: 0 };

  constructor(around: Surroundings) {
    this.#around = around;
  }

  /** Takes the newest wish; a stage that runs for an older one stops at its next breath. */
  async want(wanted: Wanted, serial = 0): Promise<void> {
    // What does not concern the file lets its reading go on.
    if (this.#wanted !== null && loadKey(this.#wanted) !== loadKey(wanted)) this.#reading.abort();
    if (this.#wanted !== wanted) this.#lookingUp.abort();
    this.#wanted = wanted;
    this.#serial = serial;
    if (this.#running) return;
    this.#running = true;
    try {
      for (;;) {
        const wish: Wanted = this.#wanted;
        try {
          await this.#fulfil(wish);
        } catch (error) {
          if (!(error instanceof Superseded)) throw error;
        }
        if (this.#wanted === wish) break;
      }
    } finally {
      this.#running = false;
    }
    this.#around.emit({ kind: 'idle', serial: this.#serial });
  }

  async #fulfil(wish: Wanted): Promise<void> {
    const load = loadKey(wish);
    const choose = load + key(wish.region, wish.cuts);
    const background = choose + key(wish.cosmology);
    const density = background + key(wish.density);
    const columns = choose + key(wish.columns);
    const stages: [Stage, string, () => Promise<void>][] = [
      ['load', load, () => this.#load(wish)],
      ['select', choose, () => this.#select(wish)],
      ['background', background, () => this.#background(wish)],
      ['density', density, () => this.#density(wish)],
      ['columns', columns, () => this.#colourColumns(wish)],
    ];
    for (const [stage, stageKey, work] of stages) {
      if (this.#keys[stage] === stageKey) continue;
      const before = { ...this.#keys };
      // What rests on a stage: going back to an earlier wish must not find later results still valid.
      for (const later of RESTING_ON[stage]) delete this.#keys[later];
      this.runs[stage]++;
      try {
        await work();
      } catch (error) {
        if (error instanceof Superseded || this.#wanted !== wish) {
          // A file that was not read to its end has changed nothing: what was there before still holds.
          if (stage === 'load' && this.#catalogue !== null) this.#keys = before;
          throw new Superseded();
        }
        if (stage === 'load') this.#drop();
        this.#around.emit({ kind: 'failed', stage, sentence: sentenceOf(error) });
        return;
      }
      this.#keys[stage] = stageKey;
      await this.#around.breathe();
      if (this.#wanted !== wish) throw new Superseded();
    }
  }

  async #load(wish: Wanted): Promise<void> {
    const { emit } = this.#around;
    if (wish.source === null) {
      this.#drop();
      emit({ kind: 'loaded', loaded: null });
      return;
    }
    if (this.#catalogue !== null && this.#catalogue.account.kept > MOST_KEPT) this.#drop();
    this.#reading = new AbortController();
    const { signal } = this.#reading;
    const total = wish.source.kind === 'url' ? wish.source.sizeBytes : null;
    const hash = startSha256();
    let sizeBytes = 0;
    let told = 0;
    emit({ kind: 'progress', stage: 'load', fraction: 0 });
    const { catalogue, header, mapping } = await loadCatalogue(await this.#bytes(wish.source, signal), {
      ...(wish.mapping === null ? {} : { mapping: wish.mapping }),
      extras: [...new Set(wish.cuts.map((c) => c.column))],
      contains: null,
      cuts: [],
      signal,
      onBytes: (chunk) => {
        hash.update(chunk);
        sizeBytes += chunk.length;
        if (sizeBytes - told > 2_000_000) {
          told = sizeBytes;
          emit({
            kind: 'progress',
            stage: 'load',
            fraction: total === null ? null : Math.min(1, sizeBytes / total),
          });
        }
      },
    });
    this.#catalogue = catalogue;
    this.#sha256 = hash.digestHex();
    this.#sample = null;
    this.#columns = [];
    emit({
      kind: 'loaded',
      loaded: {
        source: wish.source,
        readFor: loadKey(wish),
        header,
        mapping,
        account: catalogue.account,
        sha256: this.#sha256,
        sizeBytes,
      },
    });
  }

  async #select(wish: Wanted): Promise<void> {
    const { emit, floats } = this.#around;
    this.#sample = null;
    const catalogue = this.#catalogue;
    if (catalogue === null) {
      emit({ kind: 'selected', selected: null });
      return;
    }
    emit({ kind: 'progress', stage: 'select', fraction: null });
    const given = wish.region === null ? null : compileRegion(wish.region);
    const { indices, account, cutCounts } = select(
      catalogue,
      given === null ? null : (ra, dec) => given.contains(ra, dec),
      wish.cuts,
    );
    await this.#pause(wish);
    const footprint = given ?? estimateOf(catalogue, indices);
    await this.#pause(wish);
    const sample = this.#around.share(sortSample(catalogue.redshift, catalogue.weight, indices));
    this.#sample = sample;
    await this.#pause(wish);
    const { count, order } = sample;
    const directions = { x: floats(count), y: floats(count), z: floats(count) };
    const raDeg = floats(count);
    const decDeg = floats(count);
    const magnitude = catalogue.magnitude === null ? null : floats(count);
    for (let i = 0; i < count; i++) {
      const row = order[i]!;
      const ra = (catalogue.raDeg[row]! * Math.PI) / 180;
      const dec = (catalogue.decDeg[row]! * Math.PI) / 180;
      const across = cos(dec);
      directions.x[i] = across * cos(ra);
      directions.y[i] = across * sin(ra);
      directions.z[i] = sin(dec);
      raDeg[i] = catalogue.raDeg[row]!;
      decDeg[i] = catalogue.decDeg[row]!;
      if (magnitude !== null) magnitude[i] = catalogue.magnitude![row]!;
    }
    emit({
      kind: 'selected',
      selected: {
        account,
        cutCounts,
        footprint: footprint === null ? null : picture(footprint),
        sample,
        directions,
        raDeg,
        decDeg,
        magnitude,
      },
    });
  }

  async #background(wish: Wanted): Promise<void> {
    const { emit, floats } = this.#around;
    const sample = this.#sample;
    if (sample === null) {
      emit({ kind: 'background', background: null });
      return;
    }
    const table = createCosmology(wish.cosmology).table();
    const comovingMpc = floats(sample.count);
    const lookbackGyr = floats(sample.count);
    const step = 1 << 18;
    for (let from = 0; from < sample.count; from += step) {
      const z = sample.redshift.subarray(from, from + step);
      const distance = new Float64Array(z.length);
      const time = new Float64Array(z.length);
      table.fill(z, distance, time);
      comovingMpc.set(distance, from);
      lookbackGyr.set(time, from);
      await this.#pause(wish);
    }
    emit({ kind: 'background', background: { comovingMpc, lookbackGyr } });
  }

  async #density(wish: Wanted): Promise<void> {
    const { emit, floats } = this.#around;
    const [sample, catalogue] = [this.#sample, this.#catalogue];
    if (!wish.density || sample === null || catalogue === null) {
      emit({ kind: 'density', density: null });
      return;
    }
    emit({ kind: 'progress', stage: 'density', fraction: null });
    const comovingMpc = new Float64Array(sample.count);
    createCosmology(wish.cosmology).table().fill(sample.redshift, comovingMpc, null);
    await this.#pause(wish);
    const density = floats(sample.count);
    density.set(localDensity(catalogue.raDeg, catalogue.decDeg, sample.order, comovingMpc));
    emit({ kind: 'density', density });
  }

  /** Columns that the catalogue was not loaded with are read from the file in one more pass; nothing else is redone. */
  async #colourColumns(wish: Wanted): Promise<void> {
    const { emit, floats } = this.#around;
    const [sample, catalogue] = [this.#sample, this.#catalogue];
    const { source } = wish;
    if (wish.columns.length === 0 || sample === null || catalogue === null || source === null) {
      this.#columns = [];
      emit({ kind: 'columns', columns: [] });
      return;
    }
    emit({ kind: 'progress', stage: 'columns', fraction: null });
    this.#lookingUp = new AbortController();
    const { signal } = this.#lookingUp;
    this.#columns = await columnRows(wish.columns, {
      catalogue,
      sha256: this.#sha256,
      known: this.#columns,
      open: () => this.#bytes(source, signal),
      mapping: wish.mapping,
      signal,
    });
    await this.#pause(wish);
    const columns = this.#columns.map(({ column, rows }) => {
      const values = floats(sample.count);
      for (let i = 0; i < sample.count; i++) values[i] = rows[sample.order[i]!]!;
      return { column, values };
    });
    emit({ kind: 'columns', columns });
  }

  async #pause(wish: Wanted): Promise<void> {
    await this.#around.breathe();
    if (this.#wanted !== wish) throw new Superseded();
  }

  #drop(): void {
    this.#catalogue = null;
    this.#sample = null;
    this.#columns = [];
  }

  #bytes(source: EngineSource, signal?: AbortSignal): Promise<AsyncIterable<Uint8Array>> {
    return sourceBytes(source, (url) => this.#around.openUrl(url, signal));
  }

  /** The catalogue row behind the i-th galaxy by redshift. @throws Refusal when there is none (any more) */
  row(index: number): GalaxyRow {
    const [sample, catalogue] = [this.#sample, this.#catalogue];
    const row = sample?.order[index];
    if (row === undefined || catalogue === null)
      throw new Refusal('This galaxy is not loaded any more: point at it again.');
    return {
      line: catalogue.line[row]!,
      raDeg: catalogue.raDeg[row]!,
      decDeg: catalogue.decDeg[row]!,
      redshift: catalogue.redshift[row]!,
      weight: catalogue.weight?.[row] ?? null,
      magnitude: catalogue.magnitude?.[row] ?? null,
      extras: [
        ...[...catalogue.extras].map(([column, values]) => [column, values[row]!] as const),
        ...this.#columns
          .filter(({ column }) => !catalogue.extras.has(column))
          .map(({ column, rows }) => [column, rows[row]!] as const),
      ],
    };
  }

  /** The head of a file, for choosing its columns. */
  async preview(source: EngineSource): Promise<Preview> {
    return previewCatalogue(await this.#bytes(source), 20);
  }

  /** Every row set aside under the latest wish, as CSV text in parts; the source is read once more. */
  async setAsideList(): Promise<string[]> {
    const wish = this.#wanted;
    if (wish?.source == null)
      throw new Refusal('No catalogue is open, so nothing was set aside: open one first.');
    const given = wish.region === null ? null : compileRegion(wish.region);
    const list = setAsideCsv();
    await loadCatalogue(await this.#bytes(wish.source), {
      ...(wish.mapping === null ? {} : { mapping: wish.mapping }),
      extras: [],
      contains: given === null ? null : (ra, dec) => given.contains(ra, dec),
      cuts: wish.cuts,
      onSetAside: (row) => list.add(row),
    });
    return list.parts();
  }
}

const RESTING_ON: Readonly<Record<Stage, readonly Stage[]>> = {
  load: ['load', 'select', 'background', 'density', 'columns'],
  select: ['select', 'background', 'density', 'columns'],
  background: ['background', 'density'],
  density: ['density'],
  columns: ['columns'],
};

function estimateOf(catalogue: Catalogue, indices: Uint32Array): Footprint | null {
  if (indices.length === 0) return null;
  return estimateFootprint(
    Float64Array.from(indices, (i) => catalogue.raDeg[i]!),
    Float64Array.from(indices, (i) => catalogue.decDeg[i]!),
  );
}

function picture(footprint: Footprint): FootprintPicture {
  return {
    origin: footprint.origin,
    areaDeg2: footprint.areaDeg2,
    estimate: footprint.estimate,
    rings: footprint.outline(),
    fields: footprintFields(footprint),
  };
}

function key(...parts: unknown[]): string {
  return JSON.stringify(parts);
}

/** A sentence for any error: memory that ran short is told as such, a defect of ours as one. */
export function sentenceOf(error: unknown): string {
  if (error instanceof Refusal) return error.message;
  const short = error instanceof RangeError && !/call stack/i.test(error.message);
  if (short || (error instanceof Error && error.name === 'DataCloneError'))
    return 'Memory ran short while working on the catalogue: close other programs, or cut the file to the columns and rows you need.';
  return `Something in Conewright failed (${error instanceof Error ? error.message : String(error)}); what you made is kept. Please report it.`;
}
