import { computed, signal } from '@preact/signals';
import { describe, expect, it } from 'vitest';
import type { Selected } from '../../../renderer/engine/protocol.ts';
import { readyRegion } from '../../../renderer/engine/regionReady.ts';
import type { App } from '../../../renderer/state/app.ts';
import { createDerived } from '../../../renderer/state/derived.ts';
import type { EngineState } from '../../../renderer/state/engineState.ts';
import { createNotices } from '../../../renderer/state/notices.ts';
import { createStudyState } from '../../../renderer/state/studyState.ts';
import { createViewState } from '../../../renderer/state/viewState.ts';
import { beginEdgeDrag } from '../../../renderer/strip/edgeDrag.ts';
import { createPlotGestures } from '../../../renderer/strip/plotGestures.ts';
import { depthAt, readBin } from '../../../renderer/strip/readBin.ts';
import { profileWords, stripSentence } from '../../../renderer/strip/sentences.ts';
import { createStripModel } from '../../../renderer/strip/stripModel.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { emptyStudy } from '../../../shared-core/study/document.ts';
import { change, changeLook, moveEdge } from '../../../shared-core/study/edits.ts';
import type { Study } from '../../../shared-core/study/schema.ts';

const REGION: Study['region'] = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 2, radiusDeg: 2 }], holes: [] };
const EDGES = [0.4, 0.6, 0.8, 1];

function stage(redshift: readonly number[], parts: Partial<Study> = {}) {
  const notices = createNotices();
  const study: Study = { ...emptyStudy('test'), region: REGION, edges: EDGES, ...parts };
  const studyState = createStudyState(study, notices);
  const sample = sortSample(Float64Array.from(redshift), null);
  const selected = signal<Selected | null>(
    redshift.length === 0 ? null : ({ sample, footprint: null } as unknown as Selected),
  );
  const engine = {
    selected,
    loaded: signal(null),
    footprint: computed(() => {
      const { region } = studyState.study.value;
      return region && readyRegion(region).picture;
    }),
    progress: signal(null),
  } as unknown as EngineState;
  const view = createViewState('dark');
  const missingSource = signal<object | null>(null);
  const app = {
    notices,
    studyState,
    engine,
    view,
    files: { missingSource },
    derived: createDerived(studyState, engine),
  } as unknown as App;
  const model = createStripModel(app);
  model.size.value = { widthPx: 592, heightPx: 200, fontPx: 12 };
  return { app, missingSource, model, studyState, view, notices, gestures: createPlotGestures(app, model) };
}

/** Redshifts spread over 0.1 to 1.5. */
const galaxies = Array.from({ length: 4000 }, (_, i) => 0.1 + 1.4 * ((i * 0.6180339887) % 1));

describe('the strip model', () => {
  it('counts every galaxy in view once', () => {
    for (const radial of ['redshift', 'comoving', 'lookback'] as const) {
      const { model, studyState } = stage(galaxies);
      studyState.perform(changeLook('read', { radial }));
      const profile = model.profile.value!;
      expect(profileWords(profile).galaxies).toBe(4000);
      expect(profile.power).not.toBeNull();
    }
  });
  it('says where a closed universe ends before the galaxies do, and draws nearer ones all the same', () => {
    // Omega_m 0.3 and dark energy 1.7 put the antipode, pi c / (H0 sqrt(-Omega_k)) = 13.9 Gpc, at z 1.4.
    const { model, studyState, view } = stage(galaxies, { edges: [] });
    const { cosmology } = studyState.study.value;
    expect(model.trouble.value).toBeNull();
    studyState.perform(change('closed', { cosmology: { ...cosmology, omegaM0: 0.3, omegaDe0: 1.7 } }));
    expect(model.profile.value).toBeNull();
    expect(model.trouble.value).toMatch(/^This closed universe ends \(at its antipode\) 13\d{3} Mpc away/);
    view.redshiftWindow.value = [0.1, 0.6];
    expect(model.trouble.value).toBeNull();
    expect(model.profile.value!.density.some((n) => n > 0)).toBe(true);
  });
  it('does not count again when an edge moves', () => {
    const { model, studyState } = stage(galaxies);
    const [profile, scale, density] = [model.profile.value, model.scale.value, model.density.value];
    studyState.perform(moveEdge(1, 0.65));
    expect(model.profile.value).toBe(profile);
    expect(model.scale.value).toBe(scale);
    expect(model.density.value).toBe(density);
  });
  it('shows the density of the core in the chosen units, and nP the same in both', () => {
    const { model, studyState, app } = stage(galaxies);
    studyState.perform(changeLook('read', { radial: 'redshift' }));
    const [plain, h] = [model.profile.value!, app.derived.cosmology.value.h];
    studyState.perform(changeLook('h', { perH: true }));
    const perH = model.profile.value!;
    const i = plain.bins.first + 5;
    expect(perH.density[i]! / plain.density[i]!).toBeCloseTo(h ** -3, 9);
    expect(perH.power![i]!).toBeCloseTo(plain.power![i]!, 9);
    expect([plain.unit, perH.unit]).toEqual(['Mpc⁻³', '(h/Mpc)³']);
    // The right scale is the left one times P0: the curve can be read on both.
    expect(perH.smooth[i]! * model.powerPerDensity.value!).toBeCloseTo(perH.power![i]!, 9);
  });
  it('survives nothing, one galaxy, and all at one redshift', () => {
    const none = stage([]);
    expect(none.model.profile.value).toBeNull();
    expect(none.model.density.value.high).toBeGreaterThan(0);
    expect(none.model.binStep.value).toBeGreaterThan(0);
    for (const redshift of [[0.73], Array(50).fill(0.73)]) {
      const { model } = stage(redshift, { edges: [] });
      const profile = model.profile.value!;
      expect(profileWords(profile).galaxies).toBe(redshift.length);
      expect(profile.hasCurve).toBe(redshift.length >= 20);
      expect(model.density.value.share(Math.max(...profile.density))!).toBeLessThanOrEqual(1);
    }
  });
  it('counts without an area, and says no density then', () => {
    const { model } = stage(galaxies, { region: null });
    const profile = model.profile.value!;
    expect(profile.power).toBeNull();
    expect(model.powerPerDensity.value).toBeNull();
    expect(readBin(model, 300)).toHaveLength(2);
  });
  it('reads the bin under a pixel', () => {
    const { model } = stage(galaxies);
    const profile = model.profile.value!;
    const i = profile.bins.first + 8;
    const middle = (profile.bins.shownEdges[i]! + profile.bins.shownEdges[i + 1]!) / 2;
    const px = model.scale.value!.atReading(middle / model.primary.value.factor);
    expect(readBin(model, px)[1]).toMatch(new RegExp(`^${profile.count[i]} galax`));
    expect(depthAt(model, px)).toMatch(/^z \d\.\d{4} · \d+\.\d{3} Gyr · \d+\.\d Mpc$/);
  });
});

describe('dragging an edge', () => {
  it('is one step of undo, holds the window still, and lets go of it', () => {
    const { app, model, studyState, view } = stage(galaxies);
    const scale = model.scale.value!;
    const drag = beginEdgeDrag(app, model, 3, scale.at(1) + 2)!;
    for (let i = 1; i <= 20; i++) drag.to(scale.at(1) + 2 + 30 * i);
    expect(model.scale.value!.at(0.6)).toBeCloseTo(scale.at(0.6), 9);
    expect(studyState.study.value.edges[3]!).toBeGreaterThan(1.4);
    drag.end();
    expect(view.redshiftWindow.value).toBeNull();
    studyState.undo();
    expect(studyState.study.value.edges).toEqual(EDGES);
    expect(studyState.undoLabel.value).toBeNull();
  });
  it('is taken back as a whole', () => {
    const { app, model, studyState } = stage(galaxies);
    const drag = beginEdgeDrag(app, model, 1, model.scale.value!.at(0.6))!;
    drag.to(model.scale.value!.at(0.7));
    drag.to(model.scale.value!.at(0.65));
    drag.cancel();
    drag.end();
    expect(studyState.study.value.edges).toEqual(EDGES);
  });
  it('leaves a window that was chosen alone, and no notice whatever happens', () => {
    const { app, model, view, notices } = stage(galaxies);
    view.redshiftWindow.value = [0.2, 1.2];
    const drag = beginEdgeDrag(app, model, 1, 200)!;
    for (const px of [-500, 900, 64, 528, 300]) drag.to(px);
    drag.end();
    expect(view.redshiftWindow.value).toEqual([0.2, 1.2]);
    expect(notices.list.value).toEqual([]);
    expect(beginEdgeDrag(app, model, 9, 200)).toBeNull();
  });
});

describe('gestures', () => {
  it('click selects, dragging pans', () => {
    const { gestures, model, view } = stage(galaxies);
    const px = model.scale.value!.at(0.7);
    gestures.press(px);
    gestures.release(px + 1, true);
    expect(view.selectedShell.value).toBe(1);
    gestures.zoom(px, 0.5);
    const low = model.scale.value!.low;
    gestures.press(px);
    expect(gestures.drag(px - 2)).toBe(false);
    expect(gestures.drag(px - 40)).toBe(true);
    gestures.release(px - 40, true);
    expect(model.scale.value!.low).toBeGreaterThan(low);
    expect(view.selectedShell.value).toBe(1);
    gestures.showWhole();
    expect(view.redshiftWindow.value).toBeNull();
    gestures.showShells();
    expect(model.scale.value!.at(0.4)).toBeGreaterThan(64);
  });
  it('add edges where they are pointed', () => {
    const { gestures, model, studyState } = stage(galaxies);
    gestures.addEdgeAt(model.scale.value!.at(0.7));
    expect(studyState.study.value.edges).toHaveLength(5);
    expect(studyState.study.value.edges[2]!).toBeCloseTo(0.7, 2);
    const first = stage([], { edges: [] });
    first.gestures.addEdgeAt(200);
    first.gestures.addEdgeAt(400);
    expect(first.studyState.study.value.edges).toHaveLength(2);
    expect(first.notices.list.value).toEqual([]);
  });
});

describe('sentences', () => {
  it('say why there is no histogram and what to do', () => {
    expect(stripSentence(stage([]).app)).toEqual({
      empty: 'No catalogue yet: the shells are a plan.',
      hint: null,
    });
    expect(stripSentence(stage([], { edges: [] }).app).hint).toMatch(/^No shells yet: double-click/);
    expect(stripSentence(stage([], { edges: [0.4] }).app).hint).toMatch(/^One edge/);
    expect(stripSentence(stage(galaxies).app)).toEqual({ empty: null, hint: null });
    const lost = stage([], { source: { kind: 'demo', seed: 1 } });
    expect(stripSentence(lost.app).empty).toMatch(/could not be read/);
    lost.missingSource.value = {};
    expect(stripSentence(lost.app).empty).toMatch(/not at hand/);
  });
  it('follow the study', () => {
    const { app, studyState } = stage([]);
    studyState.perform(change('none', { edges: [] }));
    expect(stripSentence(app).empty).toBe('No catalogue yet: open one to see its density.');
  });
});
