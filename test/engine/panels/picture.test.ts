import { beforeAll, describe, expect, it } from 'vitest';
import type { BenchAnswer } from '../../../renderer/panels/picture/benchMessages.ts';
import { FIRST_CHOICES, type PictureChoices } from '../../../renderer/panels/picture/pictureChoices.ts';
import { PictureDesk } from '../../../renderer/panels/picture/pictureDesk.ts';
import { memoryTrouble, pictureRemarks } from '../../../renderer/panels/picture/pictureRemarks.ts';
import { previewScene } from '../../../renderer/panels/picture/previewScene.ts';
import { readChoices } from '../../../renderer/panels/picture/readChoices.ts';
import { captionOffer, composePicture } from '../../../renderer/picture/composePicture.ts';
import { type PictureFacts, pictureNumbers } from '../../../renderer/picture/numbers.ts';
import { fingerprintOf } from '../../../renderer/picture/page/gatherFacts.ts';
import { sceneToSvg } from '../../../renderer/picture/sceneToSvg.ts';
import { MemorySink } from '../../../renderer/picture/write/sink.ts';
import { drawingBytes } from '../../../shared-core/picture/memory.ts';
import { PICTURE_VIEWS, pictureOptions } from '../../../shared-core/picture/options.ts';
import { factsOf, small } from '../picture/facts.ts';

let facts: PictureFacts;
beforeAll(async () => {
  const made = await factsOf();
  facts = { ...made, fingerprint: fingerprintOf(made.study) };
});

const read = (part: Partial<PictureChoices> = {}) => readChoices({ ...FIRST_CHOICES, ...part }, [1280, 800]);

describe('what stands on the bench', () => {
  it('is at first what the command draws when nothing is said', () => {
    expect(read().options).toEqual(pictureOptions({}));
  });

  it('names sizes, sheets of paper either way up (ISO 216 at 300 dots an inch) and the window', () => {
    // 297 mm / 25.4 * 300 = 3507.9; 210 mm: 2480.3.
    expect(read({ size: 'a4' }).options).toMatchObject({ widthPx: 3508, heightPx: 2480 });
    expect(read({ size: 'a4', upright: true }).options).toMatchObject({ widthPx: 2480, heightPx: 3508 });
    expect(read({ size: 'screen' }).options).toMatchObject({ widthPx: 1280, heightPx: 800 });
    expect(read({ size: 'own', ownWidthPx: '640', ownHeightPx: '400', dpi: '96' }).options).toMatchObject({
      widthPx: 640,
      heightPx: 400,
      dpi: 96,
    });
  });

  it.each([
    ['0', /^The width in pixels is 0: give a number from 64 to 16384\.$/],
    ['1e6', /^The width in pixels is 1e6: give a number from 64 to 16384\.$/],
    ['wide', /^The width in pixels is "wide": give a number/],
    ['', /^The width in pixels is empty: give a number/],
  ])('refuses a width of %j with a sentence at its field', (ownWidthPx, sentence) => {
    const { options, troubles } = read({ size: 'own', ownWidthPx });
    expect(options).toBeNull();
    expect([...troubles.keys()]).toEqual(['ownWidthPx']);
    expect(troubles.get('ownWidthPx')).toMatch(sentence);
  });

  it('refuses a label off the sky or without words, and a slab upside down', () => {
    const label = { raDeg: '10', decDeg: '95', redshift: '-1', text: ' ' };
    expect([...read({ labels: [label] }).troubles.keys()]).toEqual([
      'label0.text',
      'label0.decDeg',
      'label0.redshift',
    ]);
    const slab = { view: 'wedge', slab: 'declination', decMinDeg: '9', decMaxDeg: '5' } as const;
    expect(read(slab).troubles.get('')).toMatch(/give the lower one first/);
    expect(read({ ...slab, decMaxDeg: '12' }).options?.slab).toEqual({
      kind: 'declination',
      decMinDeg: 9,
      decMaxDeg: 12,
    });
    expect(read({ ...slab, view: 'cone' }).options?.slab).toBeNull();
  });

  it('ends at a redshift of choice, or shows everything', () => {
    expect(read({ depthRedshift: ' 1.5 ' }).options?.depthRedshift).toBe(1.5);
    expect(read({ depthRedshift: '' }).options?.depthRedshift).toBeNull();
    expect(read({ depthRedshift: '-1' }).troubles.get('depthRedshift')).toMatch(/ends is -1: give a number/);
  });

  it('is a film by choice, with a size, length and view of its own', () => {
    const film = read({ what: 'film', view: 'sky', transparent: true, size: 'a0' });
    expect(film.options).toEqual(pictureOptions({ widthPx: 1920, heightPx: 1080 }));
    expect(film.film).toEqual({ kind: 'turntable', seconds: 12, framesPerSecond: 30, field: 1 });
    expect(read().film).toBeNull();
  });

  it.each([
    [{ seconds: '0' }, 'seconds', /The length in seconds is 0: give a number from 0\.1 to 600/],
    [{ seconds: 'long' }, 'seconds', /The length in seconds is "long"/],
    [{ framesPerSecond: '1000' }, 'framesPerSecond', /Frames a second is 1000/],
    [{ filmSize: 'own', ownWidthPx: '1e6' }, 'ownWidthPx', /give a number from 64 to 4096/],
    [{ filmSize: 'own', ownWidthPx: '1281', ownHeightPx: '720' }, '', /even sides, such as 1282/],
    [{ seconds: '600', framesPerSecond: '60' }, '', /36000 frames/],
    [{ framesPerSecond: '29.97' }, '', /29\.97 frames a second: give a whole number/],
  ] as const)('a film of %j is refused at its field', (part, at, sentence) => {
    const { options, film, troubles } = read({ what: 'film', ...part });
    expect([options, film]).toEqual([null, null]);
    expect(troubles.get(at)).toMatch(sentence);
  });

  it('refuses a title longer than a picture takes', () => {
    expect(read({ title: 'x'.repeat(2001) }).troubles.get('')).toMatch(/title/);
  });
});

describe('remarks', () => {
  it('tell of long labels and of shells without galaxies', () => {
    const options = small({
      labels: [{ text: 'x'.repeat(500), raDeg: 0, decDeg: 0, redshift: 0.1 }],
    });
    const { shells } = pictureNumbers(options, facts);
    const some = [{ ...shells[0]!, count: 0 }, shells[1]!];
    const remarks = pictureRemarks(options, some);
    expect(remarks[0]).toMatch(/has 500 letters/);
    expect(remarks[1]).toContain(`${shells[0]!.zMin} ≤ z < ${shells[0]!.zMax} holds no galaxies`);
    // A plan has none anywhere, which is no news.
    expect(pictureRemarks(small({}), [{ ...shells[0]!, count: 0 }])).toEqual([]);
    expect(pictureRemarks(small({ shells: false }), some)).toEqual([]);
  });

  it('tell of memory that is short before anything is begun', () => {
    const needed = drawingBytes(10_000_000, null);
    expect(memoryTrouble('The picture', needed, 2)).toMatch(
      /needs about 1\.2 GB of memory, and this machine has 2 GB/,
    );
    expect(memoryTrouble('The picture', needed, 8)).toBeNull();
    expect(memoryTrouble('The picture', needed, undefined)).toBeNull();
  });
});

describe.each(PICTURE_VIEWS)('view %s', (view) => {
  it('is offered the very caption that it would have', () => {
    const options = small({ view });
    const offered = captionOffer(options, facts);
    expect(composePicture({ ...options, caption: offered }, facts)).toEqual(composePicture(options, facts));
    expect(offered.length).toBeGreaterThan(80);
  });
});

describe('the preview', () => {
  it('is the same scene at fewer pixels, whatever its shape', () => {
    const scene = composePicture(small({ widthPx: 16384, heightPx: 64 }), facts);
    const seen = previewScene(scene, [800, 600]);
    expect([seen.widthPx, seen.heightPx]).toEqual([800, 3]);
    expect(seen.items).toBe(scene.items);
    expect(seen.pxPerUnit * seen.width).toBeCloseTo(800, 6);
    expect(previewScene(composePicture(small(), facts), [4000, 4000]).widthPx).toBe(480);
  });
});

/** A desk whose page takes each piece, until it gives up after so many. */
async function exported(options: object, giveUpAfter = Number.POSITIVE_INFINITY) {
  const answers: BenchAnswer[] = [];
  let pieces = 0;
  const desk = new PictureDesk((answer) => {
    answers.push(answer);
    if (answer.kind !== 'piece') return;
    const kind = ++pieces > giveUpAfter ? 'cancel' : 'more';
    queueMicrotask(() => void desk.take({ kind, id: 7 }));
  }, fingerprintOf);
  const { study, selected, background, density, columns } = facts;
  await desk.take({ kind: 'facts', facts: { study, selected, background, density, columns } });
  await desk.take({ kind: 'export', id: 7, format: 'svg', options: { ...small(), ...options }, film: null });
  return answers;
}

describe('the worker', () => {
  it('writes the bytes that the picture page writes, with progress', async () => {
    const answers = await exported({});
    const sink = new MemorySink();
    await sceneToSvg(composePicture(small(), facts), sink);
    const sent = answers.filter((answer) => answer.kind === 'piece').map((answer) => answer.bytes);
    expect(Buffer.concat(sent).equals(Buffer.from(sink.bytes()))).toBe(true);
    expect(answers.at(-1)).toEqual({ kind: 'done', id: 7 });
    expect(answers.filter((answer) => answer.kind === 'progress').at(-1)).toMatchObject({ fraction: 1 });
  });

  it('stops when the page gives up, and says what it cannot draw', async () => {
    expect((await exported({}, 0)).at(-1)).toEqual({ kind: 'cancelled', id: 7 });
    expect((await exported({ colourBy: 'density' })).at(-1)).toMatchObject({
      kind: 'refused',
      sentence: expect.stringMatching(/coloured by local density/),
    });
  });
});
