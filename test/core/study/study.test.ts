import { describe, expect, it } from 'vitest';
import { emptyStudy, readStudy, writeStudy } from '../../../shared-core/study/document.ts';
import {
  addEdge,
  change,
  edgesInTheWay,
  moveEdge,
  moveEdgeThrough,
  removeEdge,
  removeShell,
  setEdges,
} from '../../../shared-core/study/edits.ts';
import { perform, redo, startHistory, undo } from '../../../shared-core/study/history.ts';
import { type Study, USUAL_LIGHT } from '../../../shared-core/study/schema.ts';

const full: Study = {
  ...emptyStudy('Round trip'),
  source: { kind: 'file', name: 'a.csv', path: null, sizeBytes: 12, sha256: 'ab'.repeat(32) },
  mapping: {
    ra: 'RA',
    dec: 'DEC',
    radial: { column: 'V', kind: 'czKmS' },
    weight: null,
    magnitude: 'Mag',
    id: null,
  },
  cuts: [{ column: 'Mag', min: null, max: 17.5 }],
  region: {
    parts: [
      { kind: 'box', raMinDeg: 350, raMaxDeg: 10, decMinDeg: -5, decMaxDeg: 5 },
      { kind: 'cap', raDeg: 100, decDeg: 20, radiusDeg: 2 },
      {
        kind: 'polygon',
        verticesDeg: [
          [200, 0],
          [210, 0],
          [205, 8],
        ],
        side: 'smaller',
      },
    ],
    holes: [{ kind: 'cap', raDeg: 0, decDeg: 0, radiusDeg: 0.5 }],
  },
  edges: [0.1, 0.2, 0.30000000000000004],
};

describe('the study document', () => {
  it('comes back from its text as it was, to the last digit', () => {
    expect(readStudy(writeStudy(full))).toEqual(full);
    expect(readStudy(writeStudy(emptyStudy()))).toEqual(emptyStudy());
  });

  it.each([
    ['', /not JSON/],
    ['{"a":', /not JSON/],
    ['[]', /not a study/],
    ['null', /not a study/],
    ['{"format":"something"}', /not a study/],
    [
      writeStudy(full).replace('"version": 2', '"version": 3'),
      /version 3, this program reads up to version 2: open it with a newer/,
    ],
    [writeStudy(full).replace('"version": 2', '"version": "one"'), /version is "one"/],
    [
      writeStudy(full).replace('"version": 2', '"version": 0'),
      /version 0, which this program can no longer read/,
    ],
    [writeStudy(full).replace('0.1,', '0.25,'), /must increase: 0.25 is followed by 0.2/],
    [writeStudy(full).replace('"Round trip"', '""'), /at name/],
    [writeStudy(full).replace('"decMinDeg": -5', '"decMinDeg": 50'), /cannot be used/],
    [writeStudy(full).replace('"edges"', '"edgez"'), /cannot be used/],
    [writeStudy({ ...full, cosmology: { ...full.cosmology, h0KmSMpc: -70 } }), /cannot be used.*-70/],
  ])('refuses %#: a sentence that names what is wrong', (text, sentence) => {
    expect(() => readStudy(text)).toThrow(sentence);
  });

  it('lifts version 1, whose look had neither colour map nor light', () => {
    const { colourMap, light, ...look } = full.look;
    const lifted = readStudy(JSON.stringify({ ...full, version: 1, look }));
    expect(lifted).toEqual({ ...full, look: { ...full.look, colourMap: 'harbour', light: USUAL_LIGHT } });
    expect([colourMap, light]).toEqual([lifted.look.colourMap, lifted.look.light]);
  });

  it.each([
    ['pointSize', 0],
    ['pointSize', 4.5],
    ['exposureStops', 9],
    ['glow', -0.1],
    ['depthCue', 1.1],
    ['stretch', 'cubic'],
  ])('refuses a light whose %s is %s, and says where', (key, value) => {
    const look = { ...full.look, light: { ...full.look.light, [key]: value } };
    expect(() => readStudy(JSON.stringify({ ...full, look }))).toThrow(new RegExp(`at look.light.${key}`));
  });

  it('lifts old versions step by step through the migrations', () => {
    const { p0Mpc3PerH3, ...old } = { ...full, version: 0 };
    const lifted = readStudy(JSON.stringify(old), {
      0: (raw) => ({ ...raw, version: 1, p0Mpc3PerH3 }),
      1: (raw) => ({ ...raw, version: 2 }),
    });
    expect(lifted).toEqual(full);
  });
});

describe('edits', () => {
  const study: Study = { ...emptyStudy(), edges: [0.2, 0.4, 0.6, 0.8] };
  const edgesAfter = (edit: ReturnType<typeof setEdges>) => edit.apply(study).edges;

  it('move, add, split, merge and remove edges and shells', () => {
    expect(edgesAfter(moveEdge(1, 0.5))).toEqual([0.2, 0.5, 0.6, 0.8]);
    expect(edgesAfter(addEdge(0.7))).toEqual([0.2, 0.4, 0.6, 0.7, 0.8]);
    expect(edgesAfter(addEdge(1))).toEqual([0.2, 0.4, 0.6, 0.8, 1]);
    expect(edgesAfter(removeEdge(1))).toEqual([0.2, 0.6, 0.8]);
    expect(edgesAfter(removeShell(0))).toEqual([0.4, 0.6, 0.8]);
    expect(edgesAfter(removeShell(1))).toEqual([0.2, 0.5, 0.8]);
    expect(edgesAfter(removeShell(2))).toEqual([0.2, 0.4, 0.6]);
  });

  it('name the edge in the way in few digits, and what to do', () => {
    const deep = { ...study, edges: [0.0786, 0.5, 0.7, 1.1302810587092593, 1.3] };
    const why = (edit: ReturnType<typeof setEdges>) => {
      try {
        edit.apply(deep);
        return '';
      } catch (error) {
        return (error as Error).message;
      }
    };
    expect(why(moveEdge(4, 0.9))).toBe(
      '0.9 lies before edge 4 (z 1.1303): remove edge 4 first, or lay the shells out anew up to 0.9, or give another place.',
    );
    expect(why(moveEdge(0, 0.7))).toBe(
      '0.7 is the place of edge 3 (z 0.7): remove edges 2 to 3 first, or lay the shells out anew from 0.7, or give another place.',
    );
    expect(why(moveEdge(1, 1.13028106))).toBe(
      '1.13028106 lies behind edge 4 (z 1.130281059): remove edges 3 to 4 first, or give another place.',
    );
    expect(moveEdgeThrough(4, 0.9).apply(deep).edges).toEqual([0.0786, 0.5, 0.7, 0.9]);
    expect(moveEdgeThrough(1, 1.2).apply(deep).edges).toEqual([0.0786, 1.2, 1.3]);
    expect(moveEdgeThrough(1, 0.6).apply(deep).edges).toEqual(deep.edges.with(1, 0.6));
    expect(moveEdgeThrough(4, 0.01).apply(deep).edges).toEqual([0.01]);
    expect(edgesInTheWay(deep.edges, 4, 0.6)).toEqual([2, 3]);
    expect(edgesInTheWay(deep.edges, 0, 0.1)).toBeNull();
  });

  it('refuse what cannot be, and leave the study alone', () => {
    expect(() => moveEdge(1, 1200).apply(study)).toThrow(/edge 4 \(z 0.8\)/);
    expect(() => moveEdge(3, 1200).apply(study)).toThrow(/0 to 1100/);
    expect(() => moveEdge(9, 0.7).apply(study)).toThrow(/no edge 10/);
    expect(() => addEdge(0.4).apply(study)).toThrow(/an edge at redshift 0.4 already/);
    expect(() => removeShell(3).apply(study)).toThrow(/no shell 4/);
    expect(study.edges).toEqual([0.2, 0.4, 0.6, 0.8]);
  });
});

describe('history', () => {
  const start = startHistory({ ...emptyStudy(), edges: [0.2, 0.4] });

  it('takes every edit back and does it again', () => {
    const edits = [
      change('Rename', { name: 'A' }),
      setEdges([0.1, 0.3]),
      moveEdge(1, 0.5),
      change('P0', { p0Mpc3PerH3: 4000 }),
    ];
    const states = [start];
    for (const edit of edits) states.push(perform(states.at(-1)!, edit));
    let history = states.at(-1)!;
    for (let i = states.length - 2; i >= 0; i--) {
      history = undo(history);
      expect(history.present).toEqual(states[i]!.present);
    }
    expect(undo(history)).toBe(history);
    for (let i = 1; i < states.length; i++) {
      history = redo(history);
      expect(history.present).toEqual(states[i]!.present);
    }
    expect(redo(history)).toBe(history);
  });

  it('counts a drag as one step, and two drags as two', () => {
    let history = start;
    for (const z of [0.41, 0.42, 0.43]) history = perform(history, moveEdge(1, z, 'drag 1'));
    for (const z of [0.44, 0.45]) history = perform(history, moveEdge(1, z, 'drag 2'));
    expect(history.past).toHaveLength(2);
    expect(undo(history).present.edges).toEqual([0.2, 0.43]);
    expect(undo(undo(history)).present.edges).toEqual([0.2, 0.4]);
  });

  it('forgets the way forth when something else is done, and ignores edits that change nothing', () => {
    const moved = perform(start, moveEdge(1, 0.5));
    const other = perform(undo(moved), change('Rename', { name: 'B' }));
    expect(other.future).toEqual([]);
    expect(perform(other, change('Rename', { name: 'B' }))).toBe(other);
  });
});
