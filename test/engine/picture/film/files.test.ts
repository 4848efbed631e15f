import { describe, expect, it } from 'vitest';
import type { FilmFacts, FilmFile } from '../../../../renderer/picture/film/write/filmFile.ts';
import { Mp4File } from '../../../../renderer/picture/film/write/mp4.ts';
import { movieBox } from '../../../../renderer/picture/film/write/mp4Movie.ts';
import { WebmFile } from '../../../../renderer/picture/film/write/webm.ts';
import { YuvFrame } from '../../../../renderer/picture/film/yuv.ts';
import { MemorySink } from '../../../../renderer/picture/write/sink.ts';
import { at, numberOf, readBoxes, readEbml, tagsOf, textOf } from './containers.ts';

const FACTS: FilmFacts = {
  widthPx: 640,
  heightPx: 360,
  frames: 7,
  framesPerSecond: 30,
  metadata: {
    title: 'Ostrewick צביר',
    description: 'Seven frames.',
    credit: 'A survey',
    software: 'Conewright',
    fingerprint: 'ab'.repeat(32),
  },
};
/** Seven frames of different length, a key frame first and at the fifth; the fourth is longer than 2^14 bytes. */
const FRAMES = [300, 20, 0, 20_000, 127, 5, 1].map((length, i) => ({
  bytes: new Uint8Array(length).fill(i + 1),
  key: i === 0 || i === 4,
}));

async function written(open: (sink: MemorySink) => Promise<FilmFile>): Promise<Uint8Array> {
  const sink = new MemorySink();
  const file = await open(sink);
  for (const frame of FRAMES) await file.add(frame);
  await file.end();
  return sink.bytes();
}

describe('WebM (RFC 8794, RFC 9559)', () => {
  it('holds every frame at its time, and what the film is', async () => {
    const parts = readEbml(await written((sink) => WebmFile.open(sink, FACTS)));
    expect(parts.map(({ id }) => id)).toEqual(['1a45dfa3', '18538067']);
    expect(textOf(at(parts, '1a45dfa3', '4282')[0])).toBe('webm');
    const segment = ['18538067'] as const;
    const info = [...segment, '1549a966'] as const;
    expect(numberOf(at(parts, ...info, '2ad7b1')[0])).toBe(1_000_000);
    const duration = at(parts, ...info, '4489')[0]!.content;
    expect(new DataView(duration.buffer, duration.byteOffset).getFloat64(0)).toBeCloseTo(7000 / 30, 9);
    const track = [...segment, '1654ae6b', 'ae'] as const;
    expect(textOf(at(parts, ...track, '86')[0])).toBe('V_VP9');
    expect(numberOf(at(parts, ...track, 'e0', 'b0')[0])).toBe(640);
    expect(numberOf(at(parts, ...track, 'e0', 'ba')[0])).toBe(360);
    const clusters = at(parts, ...segment, '1f43b675');
    const blocks = clusters.flatMap(({ parts: inside }) => {
      const start = numberOf(at(inside, 'e7')[0]);
      return at(inside, 'a3').map(({ content }) => ({
        track: content[0],
        ms: start + content[1]! * 256 + content[2]!,
        key: content[3] === 0x80,
        bytes: content.subarray(4),
      }));
    });
    // Frames of 1/30 s, to the millisecond.
    expect(blocks.map(({ ms }) => ms)).toEqual([0, 33, 67, 100, 133, 167, 200]);
    expect(clusters).toHaveLength(2);
    for (const [i, block] of blocks.entries()) {
      expect(block.track).toBe(0x81);
      expect(block.key).toBe(FRAMES[i]!.key);
      expect(Buffer.from(block.bytes).equals(Buffer.from(FRAMES[i]!.bytes))).toBe(true);
    }
    expect(tagsOf(parts)).toEqual({
      TITLE: 'Ostrewick צביר',
      DESCRIPTION: 'Seven frames.',
      STUDY: `study sha256:${'ab'.repeat(32)}`,
      COPYRIGHT: 'A survey',
    });
  });

  it('does not end with frames missing', async () => {
    const file = await WebmFile.open(new MemorySink(), FACTS);
    await file.add(FRAMES[0]!);
    await expect(file.end()).rejects.toThrow('1 of 7 frames');
  });
});

describe('MP4 (ISO/IEC 14496-12)', () => {
  it('tells where every frame lies, and what the film is', async () => {
    const avcC = Uint8Array.of(1, 0x64, 0, 0x1f, 0xff);
    const bytes = await written((sink) => Mp4File.open(sink, FACTS, avcC));
    const parts = readBoxes(bytes);
    expect(parts.map(({ id }) => id)).toEqual(['ftyp', 'mdat', 'mdat', 'moov']);
    const table = ['moov', 'trak', 'mdia', 'minf', 'stbl'] as const;
    const words = (id: string): number[] => {
      const { content } = at(parts, ...table, id)[0]!;
      const view = new DataView(content.buffer, content.byteOffset, content.length);
      return Array.from({ length: content.length / 4 }, (_, i) => view.getUint32(4 * i));
    };
    expect(words('stts').slice(1)).toEqual([1, 7, 1000]);
    expect(words('stss').slice(1)).toEqual([2, 1, 5]);
    const sizes = words('stsz').slice(3);
    expect(sizes).toEqual(FRAMES.map((frame) => frame.bytes.length));
    const offsets = words('stco').slice(2);
    const runs = words('stsc').slice(2);
    let frame = 0;
    for (const [chunk, offset] of offsets.entries()) {
      let place = offset;
      for (let i = 0; i < runs[3 * chunk + 1]!; i++, frame++) {
        const stored = Buffer.from(bytes.subarray(place, place + sizes[frame]!));
        expect(stored.equals(Buffer.from(FRAMES[frame]!.bytes))).toBe(true);
        place += sizes[frame]!;
      }
    }
    expect(frame).toBe(7);
    const header = at(parts, 'moov', 'mvhd')[0]!.content;
    const view = new DataView(header.buffer, header.byteOffset);
    expect(view.getUint32(16) / view.getUint32(12)).toBeCloseTo(7 / 30, 9);
    expect(Buffer.from(at(parts, ...table, 'stsd')[0]!.content).includes(Buffer.from(avcC))).toBe(true);
    const texts = at(parts, 'moov', 'udta', 'meta', 'ilst')[0]!.parts.map(({ id, parts: [data] }) => [
      id,
      new TextDecoder().decode(data!.content.subarray(8)),
    ]);
    expect(Object.fromEntries(texts)).toEqual({
      '©nam': 'Ostrewick צביר',
      desc: 'Seven frames.',
      '©cmt': `study sha256:${'ab'.repeat(32)}`,
      '©too': 'Conewright',
      cprt: 'A survey',
    });
  });
});

describe('MP4 beyond 4 GB', () => {
  const offsetsOf = (offsets: readonly number[]) => {
    const chunks = offsets.map((offset) => ({ offset, frames: 1 }));
    const samples = { sizes: offsets.map(() => 9), keys: [1], chunks, avcC: Uint8Array.of(1) };
    const parts = readBoxes(movieBox({ ...FACTS, frames: offsets.length }, samples));
    const [table] = at(parts, 'moov', 'trak', 'mdia', 'minf', 'stbl');
    return table!.parts.filter(({ id }) => id === 'stco' || id === 'co64');
  };

  // ISO/IEC 14496-12, section 8.7.5: chunk offsets of 32 bits in stco, of 64 in co64; version, flags and count before.
  it('tells places of 64 bits once one needs them, and of 32 below', () => {
    const [small, ...more] = offsetsOf([48, 2 ** 32 - 1]);
    expect([small!.id, more]).toEqual(['stco', []]);
    const wide = offsetsOf([48, 2 ** 32, 2 ** 40 + 5]);
    expect(wide.map(({ id }) => id)).toEqual(['co64']);
    const { content } = wide[0]!;
    const view = new DataView(content.buffer, content.byteOffset);
    expect(view.getUint32(4)).toBe(3);
    expect([0, 1, 2].map((i) => Number(view.getBigUint64(8 + 8 * i)))).toEqual([48, 2 ** 32, 2 ** 40 + 5]);
    expect(content).toHaveLength(8 + 3 * 8);
  });

  // Sections 8.3.2, 8.4.2, 8.5.2 and 12.1.5: track width and height in 16.16, both clocks in ticks, the entry's size in
  // whole pixels, and colours of ITU-T H.273 (1 is BT.709) without the full-range bit.
  it('says size, clocks and colours where the standard has them', () => {
    const parts = readBoxes(
      movieBox(FACTS, { sizes: [1], keys: [1], chunks: [], avcC: Uint8Array.of(1, 2) }),
    );
    const viewOf = (...path: string[]) => {
      const { content } = at(parts, 'moov', 'trak', ...path)[0]!;
      return new DataView(content.buffer, content.byteOffset, content.length);
    };
    const track = viewOf('tkhd');
    expect(track.byteLength).toBe(84);
    expect([track.getUint32(76), track.getUint32(80)]).toEqual([640 * 65536, 360 * 65536]);
    const media = viewOf('mdia', 'mdhd');
    expect(media.byteLength).toBe(24);
    // Seven frames of 1/30 s.
    expect(media.getUint32(16) / media.getUint32(12)).toBeCloseTo(7 / 30, 12);
    // The track's own length is told by the movie's clock.
    const movie = at(parts, 'moov', 'mvhd')[0]!.content;
    expect(movie).toHaveLength(100);
    expect(track.getUint32(20)).toBe(new DataView(movie.buffer, movie.byteOffset).getUint32(16));
    const entry = viewOf('mdia', 'minf', 'stbl', 'stsd');
    expect([entry.getUint16(8 + 8 + 24), entry.getUint16(8 + 8 + 26)]).toEqual([640, 360]);
    const colour = Buffer.from(entry.buffer, entry.byteOffset, entry.byteLength);
    const place = colour.indexOf('colrnclx');
    expect([...colour.subarray(place + 8, place + 15)]).toEqual([0, 1, 0, 1, 0, 1, 0]);
  });
});

describe('colours of a frame (ITU-R BT.709)', () => {
  // Full colour bars in 8 bits, values from memory; they follow from the standard's coefficients.
  it.each([
    [
      [255, 255, 255],
      [235, 128, 128],
    ],
    [
      [0, 0, 0],
      [16, 128, 128],
    ],
    [
      [255, 0, 0],
      [63, 102, 240],
    ],
    [
      [0, 255, 0],
      [173, 42, 26],
    ],
    [
      [0, 0, 255],
      [32, 240, 118],
    ],
    [
      [255, 255, 0],
      [219, 16, 138],
    ],
  ])('%j', (rgb, yuv) => {
    const frame = new YuvFrame(4, 4);
    const rows = Uint8ClampedArray.from({ length: 4 * 4 * 2 }, (_, i) => [...rgb, 255][i % 4]!);
    frame.put(rows, 0);
    frame.put(rows, 2);
    expect([...frame.bytes.subarray(0, 16)]).toEqual(new Array(16).fill(yuv[0]));
    expect([...frame.bytes.subarray(16, 20)]).toEqual(new Array(4).fill(yuv[1]));
    expect([...frame.bytes.subarray(20)]).toEqual(new Array(4).fill(yuv[2]));
  });

  it('keeps each row and column where it is', () => {
    const frame = new YuvFrame(2, 4);
    const grey = (values: readonly number[]) => Uint8ClampedArray.from(values.flatMap((v) => [v, v, v, 255]));
    frame.put(grey([0, 51, 102, 153]), 0);
    frame.put(grey([204, 255, 0, 51]), 2);
    // 16 + 219/255 v
    expect([...frame.bytes.subarray(0, 8)]).toEqual([16, 60, 104, 147, 191, 235, 16, 60]);
  });
});
