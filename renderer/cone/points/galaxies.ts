import type { ConeMemory, ConeWork } from '../jobs/coneWork.ts';
import type { ColouringInput, GalaxyInput, ShellInput } from '../types.ts';
import type { PickIndex } from './pickIndex.ts';
import type { PointStore } from './pointStore.ts';
import { fillRadius, type RadiusTable, radiusTable } from './radiusTable.ts';
import { runSliced } from './slices.ts';

export type GalaxiesChange = 'store' | 'values' | 'radii';

/** Up to so many galaxies a change of radius is done at once; beyond, an even sample moves and the rest follows. */
const AT_ONCE = 300_000;

/** Fewer are searched as quickly one by one. */
const INDEXED = 200_000;

/** The galaxies as they are drawn: has the store built, keeps colours and radii up to date. */
export class Galaxies {
  store: PointStore | null = null;
  /** The part of each field's range whose radii are right. */
  ready = 1;
  /** False while the galaxies drawn are not (or not known to be) those of the input: then none can be pointed at. */
  current = false;
  /** Of each field, for pointing; null until it is made, and where it cannot be. */
  index: readonly PickIndex[] | null = null;
  private input: GalaxyInput | null = null;
  /** Of the fields that the store is sorted by, and of those that it is to be sorted by. */
  private centres: Float64Array = new Float64Array(0);
  private nextCentres = this.centres;
  private whenSorted: (() => void) | null = null;
  private table: RadiusTable = radiusTable([0, 1], [0, 1]);
  private colouring: ColouringInput = { kind: 'radius', map: 'harbour' };
  private shells: readonly ShellInput[] = [];
  /** Others will come: a store sorted anew until then is still of those before. */
  private held = false;
  private building: AbortController | null = null;
  private colourJob: AbortController | null = null;
  private radiusJob: AbortController | null = null;
  private readonly changed: (what: GalaxiesChange) => void;
  private readonly work: ConeWork;
  private readonly memory: ConeMemory;
  private readonly trouble: (sentence: string | null) => void;

  /** @param trouble told why the galaxies cannot be laid out, and null once they are */
  constructor(
    changed: (what: GalaxiesChange) => void,
    work: ConeWork,
    memory: ConeMemory,
    trouble: (sentence: string | null) => void = () => undefined,
  ) {
    this.trouble = trouble;
    this.changed = changed;
    this.work = work;
    this.memory = memory;
  }

  /** Others will come: what is drawn stays, and none of it can be pointed at. */
  hold(): void {
    this.held = true;
    this.current = false;
    this.building?.abort();
    this.colourJob?.abort();
  }

  setInput(input: GalaxyInput | null): void {
    this.hold();
    this.held = false;
    this.input = input;
    this.rebuild();
  }

  /** Sorts the galaxies by other fields; `sorted` is called when they are, and the picture may change. */
  setCentres(centres: Float64Array, sorted: () => void): void {
    // Sorting by others may be under way, and would end after this.
    const settled = sameNumbers(this.nextCentres, this.centres);
    this.nextCentres = centres;
    this.whenSorted = sorted;
    if ((settled && sameNumbers(centres, this.centres)) || !this.input) this.takeCentres();
    else this.rebuild();
  }

  setColouring(colouring: ColouringInput): void {
    this.colouring = colouring;
    this.recolour();
  }

  setShells(shells: readonly ShellInput[]): void {
    this.shells = shells;
    if (this.colouring.kind === 'shell') this.recolour();
  }

  /** Moves the galaxies to the radii of a table. `moving`: more tables follow at once. */
  setTable(table: RadiusTable, moving: boolean): void {
    const filling = this.radiusJob !== null;
    if (table === this.table && (moving || filling || this.ready === 1)) return;
    this.table = table;
    const { store } = this;
    this.radiusJob?.abort();
    this.radiusJob = null;
    if (!store) return;
    const share = Math.min(1, AT_ONCE / Math.max(1, store.count));
    for (const { start, count } of store.ranges) {
      fillRadius(table, store.arrays.comoving, store.arrays.radius, start, start + Math.ceil(count * share));
    }
    this.ready = share;
    this.changed('radii');
    if (share < 1 && !moving) this.fillAll(store, table);
    if (this.colouring.kind === 'radius' && !moving) this.recolour();
  }

  /** Catalogue row to direction and comoving distance, and the field it belongs to. */
  place(row: number): { x: number; y: number; z: number; comovingMpc: number; field: number } | null {
    const { input } = this;
    if (!input || !(row >= 0 && row < input.count)) return null;
    const d = input.directions;
    let [x, y, z] = [0, 0, 0];
    if ('x' in d) [x, y, z] = [d.x[row]!, d.y[row]!, d.z[row]!];
    else {
      const ra = (d.raDeg[row]! * Math.PI) / 180;
      const dec = (d.decDeg[row]! * Math.PI) / 180;
      [x, y, z] = [Math.cos(dec) * Math.cos(ra), Math.cos(dec) * Math.sin(ra), Math.sin(dec)];
    }
    let field = 0;
    let best = -2;
    for (let f = 0; 3 * f < this.centres.length; f++) {
      const c = x * this.centres[3 * f]! + y * this.centres[3 * f + 1]! + z * this.centres[3 * f + 2]!;
      if (c > best) [best, field] = [c, f];
    }
    return { x, y, z, comovingMpc: input.comovingMpc[row]!, field };
  }

  /** Lays the points out anew in fresh memory. */
  relay(): void {
    if (this.input) this.rebuild();
  }

  dispose(): void {
    this.whenSorted = null;
    this.building?.abort();
    this.colourJob?.abort();
    this.radiusJob?.abort();
    this.store = null;
    this.input = null;
  }

  private takeCentres(): void {
    this.centres = this.nextCentres;
    const sorted = this.whenSorted;
    this.whenSorted = null;
    sorted?.();
  }

  private rebuild(): void {
    this.building?.abort();
    this.colourJob?.abort();
    this.radiusJob?.abort();
    this.radiusJob = null;
    const { input, table, colouring, shells } = this;
    if (!input || input.count === 0) {
      this.takeStore(null);
      this.current = true;
      this.takeCentres();
      this.changed('store');
      return;
    }
    const job = new AbortController();
    this.building = job;
    const basis = { galaxies: input, centres: this.nextCentres, table, colouring, shells };
    const failed = (): void => {
      if (job.signal.aborted) return;
      this.takeStore(null);
      this.current = !this.held;
      this.takeCentres();
      this.changed('store');
      this.trouble(
        `Memory ran short for drawing ${input.count} galaxies: close other programs, or cut the file to the rows you need. All numbers stand.`,
      );
    };
    void this.work.store(basis, this.memory, job.signal).then((store) => {
      if (!store || job.signal.aborted) return;
      this.trouble(null);
      this.takeStore(store);
      this.current = !this.held;
      this.ready = 1;
      this.takeCentres();
      this.changed('store');
      if (store.count >= INDEXED) {
        void this.work.index(store, job.signal).then((index) => {
          if (this.store === store) this.index = index;
        });
      }
      if (table !== this.table) {
        this.ready = 0;
        this.setTable(this.table, false);
      }
      const asColoured =
        colouring === this.colouring && (shells === this.shells || colouring.kind !== 'shell');
      if (!asColoured) this.recolour();
    }, failed);
  }

  /** The index for pointing is of one store alone. */
  private takeStore(store: PointStore | null): void {
    this.store = store;
    this.index = null;
  }

  private recolour(): void {
    this.colourJob?.abort();
    const { store, colouring, shells, table } = this;
    // The colours of other galaxies say nothing of these; a store that is being built takes the newest with it.
    if (!store || !this.current) return;
    const job = new AbortController();
    this.colourJob = job;
    void this.work.colours(store, { colouring, shells, table }, job.signal).then((done) => {
      if (done && !job.signal.aborted) this.changed('values');
    });
  }

  private fillAll(store: PointStore, table: RadiusTable): void {
    const job = new AbortController();
    this.radiusJob = job;
    const steps = function* (): Generator<void, true> {
      const { comoving, radius } = store.arrays;
      for (const { start, count } of store.ranges) {
        for (let from = start; from < start + count; from += 65536) {
          fillRadius(table, comoving, radius, from, Math.min(start + count, from + 65536));
          yield;
        }
      }
      return true;
    };
    void runSliced(steps(), job.signal).then((done) => {
      if (!done) return;
      this.radiusJob = null;
      this.ready = 1;
      this.changed('radii');
    });
  }
}

const sameNumbers = (a: Float64Array, b: Float64Array): boolean =>
  a.length === b.length && a.every((v, i) => v === b[i]);
