import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Catalogue } from '../../shared-core/catalogue/catalogue.ts';
import { type Preview, previewCatalogue } from '../../shared-core/catalogue/preview.ts';
import { rowName } from '../../shared-core/catalogue/rowName.ts';
import type { SortedSample } from '../../shared-core/shells/sample.ts';
import type { Region } from '../../shared-core/sky/region.ts';
import { galaxyRow } from './galaxyRow.ts';
import { loadKey } from './loadKey.ts';
import type { EngineSource, FootprintPicture, GalaxyRow, Stage, Wanted } from './protocol.ts';
import { type ReadyRegion, readyRegion } from './regionReady.ts';
import { repeatsList } from './repeatsList.ts';
import { sentenceOf } from './sentenceOf.ts';
import { setAsideList } from './setAsideList.ts';
import { sourceBytes } from './sourceBytes.ts';
import { columnRows, inSampleOrder, type NamedColumn } from './stages/columnRows.ts';
import { densities } from './stages/densities.ts';
import { distances } from './stages/distances.ts';
import { readCatalogue } from './stages/readCatalogue.ts';
import { selectGalaxies } from './stages/selectGalaxies.ts';
import { RESTING_ON, stageKeys } from './stages/stageKeys.ts';
import type { StageTools, Surroundings } from './surroundings.ts';

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
 * columns (of the colours) rests on select alone. The region is made ready before them, whatever stage runs: a plan
 * has nothing else, and who draws one does not wait for a catalogue.
 */
export class EngineDesk {
  readonly #around: Surroundings;
  #wanted: Wanted | null = null;
  #serial = 0;
  #running = false;
  #reading = new AbortController();
  /** Of columns alone. */
  #lookingUp = new AbortController();
  /** Of one row's name. */
  #naming = new AbortController();
  #keys: Partial<Record<Stage, string>> = {};
  /** The region of the newest wish; asking for it throws where it cannot be made ready. */
  #region: { readonly key: string; ready(): ReadyRegion | null } | null = null;
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
    this.#takeRegion(wanted.region);
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
    /** Stages that what failed is needed for. */
    const without = new Set<Stage>();
    for (const [stage, stageKey] of stageKeys(wish)) {
      if (this.#keys[stage] === stageKey || without.has(stage)) continue;
      const before = { ...this.#keys };
      // What rests on a stage: going back to an earlier wish must not find later results still valid.
      for (const later of RESTING_ON[stage]) delete this.#keys[later];
      this.runs[stage]++;
      try {
        await this.#work[stage](wish);
      } catch (error) {
        if (error instanceof Superseded || this.#wanted !== wish) {
          // A file that was not read to its end has changed nothing: what was there before still holds.
          if (stage === 'load' && this.#catalogue !== null) this.#keys = before;
          throw new Superseded();
        }
        if (stage === 'load') this.#drop();
        this.#around.emit({ kind: 'failed', stage, sentence: sentenceOf(error) });
        for (const later of RESTING_ON[stage]) without.add(later);
        continue;
      }
      this.#keys[stage] = stageKey;
      await this.#pause(wish);
    }
  }

  /** The work of each stage on what the desk holds; without its inputs, a stage tells that it has no result. */
  readonly #work: Readonly<Record<Stage, (wish: Wanted) => Promise<void>>> = {
    load: async (wish) => {
      const { emit } = this.#around;
      if (wish.source === null) {
        this.#drop();
        emit({ kind: 'loaded', loaded: null });
        return;
      }
      if (this.#catalogue !== null && this.#catalogue.account.kept > MOST_KEPT) this.#drop();
      this.#reading = new AbortController();
      const { signal } = this.#reading;
      const { catalogue, loaded } = await readCatalogue(wish, wish.source, {
        open: (source) => this.#bytes(source, signal),
        signal,
        onFraction: (fraction) => emit({ kind: 'progress', stage: 'load', fraction }),
      });
      this.#catalogue = catalogue;
      this.#sha256 = loaded.sha256;
      this.#sample = null;
      this.#columns = [];
      emit({ kind: 'loaded', loaded });
    },

    select: async (wish) => {
      this.#sample = null;
      const catalogue = this.#catalogue;
      if (catalogue !== null) this.#begin('select');
      const region = this.#region?.ready() ?? null;
      const selected = catalogue && (await selectGalaxies(catalogue, region, wish.cuts, this.#tools(wish)));
      this.#sample = selected?.sample ?? null;
      this.#around.emit({ kind: 'selected', selected });
    },

    background: async (wish) => {
      const sample = this.#sample;
      const background = sample && (await distances(sample, wish.cosmology, this.#tools(wish)));
      this.#around.emit({ kind: 'background', background });
    },

    density: async (wish) => {
      const [sample, catalogue] = [this.#sample, this.#catalogue];
      if (!wish.density || sample === null || catalogue === null) {
        this.#around.emit({ kind: 'density', density: null });
        return;
      }
      this.#begin('density');
      const density = await densities(catalogue, sample, wish.cosmology, this.#tools(wish));
      this.#around.emit({ kind: 'density', density });
    },

    columns: async (wish) => {
      const { emit, floats } = this.#around;
      const [sample, catalogue] = [this.#sample, this.#catalogue];
      const { source } = wish;
      if (wish.columns.length === 0 || sample === null || catalogue === null || source === null) {
        this.#columns = [];
        emit({ kind: 'columns', columns: [] });
        return;
      }
      this.#begin('columns');
      this.#lookingUp = new AbortController();
      const { signal } = this.#lookingUp;
      this.#columns = await columnRows(wish.columns, {
        catalogue,
        sha256: this.#sha256,
        known: this.#columns,
        open: () => this.#bytes(source, signal),
        signal,
      });
      await this.#pause(wish);
      emit({ kind: 'columns', columns: inSampleOrder(this.#columns, sample, floats) });
    },
  };

  #takeRegion(region: Region | null): void {
    const key = JSON.stringify(region);
    if (this.#region?.key === key) return;
    let picture: FootprintPicture | null = null;
    try {
      const ready = region === null ? null : readyRegion(region);
      picture = ready?.picture ?? null;
      this.#region = { key, ready: () => ready };
    } catch (error) {
      // Told by the stage that needs it.
      const ready = (): never => {
        throw error;
      };
      this.#region = { key, ready };
    }
    this.#around.emit({ kind: 'region', region: picture });
  }

  #begin(stage: Stage): void {
    this.#around.emit({ kind: 'progress', stage, fraction: null });
  }

  #tools(wish: Wanted): StageTools {
    const { floats, share } = this.#around;
    return { floats, share, pause: () => this.#pause(wish) };
  }

  /** @throws Superseded when the wish is not wanted any more */
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
    return sourceBytes(source, this.#around.openUrl, signal);
  }

  /** The catalogue row behind the i-th galaxy by redshift. @throws Refusal when there is none (any more) */
  row(index: number): GalaxyRow {
    const [sample, catalogue] = [this.#sample, this.#catalogue];
    const row = sample?.order[index];
    if (row === undefined || catalogue === null)
      throw new Refusal('This galaxy is not loaded any more: point at it again.');
    return galaxyRow(catalogue, row, this.#columns);
  }

  /** What the name column says in the row at a line: the file is read up to there. A newer question ends an older one. */
  async name(line: number): Promise<string | null> {
    const wish = this.#wanted;
    if (wish?.source == null) return null;
    this.#naming.abort();
    this.#naming = new AbortController();
    const { signal } = this.#naming;
    return rowName(await this.#bytes(wish.source, signal), wish.mapping ?? undefined, line, { signal });
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
    return setAsideList(await this.#bytes(wish.source), wish);
  }

  /** Every galaxy of the sample that repeats an earlier one's position, as CSV text in parts. */
  async repeatsList(): Promise<string[]> {
    const [wish, sample, catalogue] = [this.#wanted, this.#sample, this.#catalogue];
    const isCurrent = wish !== null && new Map(stageKeys(wish)).get('select') === this.#keys.select;
    if (!isCurrent || wish.source === null || sample === null || catalogue === null)
      throw new Refusal('The galaxies are being read: ask for their list again once they are there.');
    const { source, mapping } = wish;
    return repeatsList(catalogue, sample.order, { mapping, open: () => this.#bytes(source) });
  }
}
