import { utf8Bytes } from '../../../../shared-core/base/textCoding.ts';
import { box, fullBox, letters, u16, u32, u64, zeros } from './boxes.ts';
import { type FilmFacts, studyText } from './filmFile.ts';

/** Where the frames of a track lie in its file, in the order of showing. */
export interface TrackSamples {
  readonly sizes: readonly number[];
  /** Numbers of the key frames, counted from 1. */
  readonly keys: readonly number[];
  readonly chunks: readonly { readonly offset: number; readonly frames: number }[];
  readonly avcC: Uint8Array;
}

/** Parts of a second in which times are counted, for each frame of a second: every frame lasts exactly this many. */
const TICKS_A_FRAME = 1000;
/** No rotation: the unit matrix in fixed point. */
const UPRIGHT = u32(0x10000, 0, 0, 0, 0x10000, 0, 0, 0, 0x40000000);
const UNDETERMINED_LANGUAGE = 0x55c4;
const SHORT_OFFSETS_BELOW = 2 ** 32;

/** The box that describes the whole film (ISO/IEC 14496-12, section 8.2), without a date, so that it repeats. */
export function movieBox(facts: FilmFacts, samples: TrackSamples): Uint8Array<ArrayBuffer> {
  const timescale = facts.framesPerSecond * TICKS_A_FRAME;
  const duration = facts.frames * TICKS_A_FRAME;
  const header = fullBox(
    'mvhd',
    0,
    0,
    u32(0, 0, timescale, duration, 0x10000),
    u16(0x100, 0),
    zeros(8),
    UPRIGHT,
    zeros(24),
    u32(2),
  );
  return box('moov', header, track(facts, samples, timescale, duration), userData(facts));
}

function track(
  facts: FilmFacts,
  samples: TrackSamples,
  timescale: number,
  duration: number,
): Uint8Array<ArrayBuffer> {
  const { widthPx, heightPx } = facts;
  const inMovieAndEnabled = 3;
  return box(
    'trak',
    fullBox(
      'tkhd',
      0,
      inMovieAndEnabled,
      u32(0, 0, 1, 0, duration),
      zeros(16),
      UPRIGHT,
      u32(widthPx * 0x10000, heightPx * 0x10000),
    ),
    box(
      'mdia',
      fullBox('mdhd', 0, 0, u32(0, 0, timescale, duration), u16(UNDETERMINED_LANGUAGE, 0)),
      fullBox('hdlr', 0, 0, u32(0), letters('vide'), zeros(12), utf8Bytes('Film\0')),
      box(
        'minf',
        fullBox('vmhd', 0, 1, zeros(8)),
        box('dinf', fullBox('dref', 0, 0, u32(1), fullBox('url ', 0, 1))),
        sampleTable(facts, samples),
      ),
    ),
  );
}

function sampleTable(facts: FilmFacts, { sizes, keys, chunks, avcC }: TrackSamples): Uint8Array<ArrayBuffer> {
  const wide = chunks.some(({ offset }) => offset >= SHORT_OFFSETS_BELOW);
  const offsets = chunks.map(({ offset }) => offset);
  return box(
    'stbl',
    fullBox('stsd', 0, 0, u32(1), sampleEntry(facts, avcC)),
    fullBox('stts', 0, 0, u32(1, sizes.length, TICKS_A_FRAME)),
    fullBox('stss', 0, 0, u32(keys.length, ...keys)),
    fullBox('stsc', 0, 0, u32(chunks.length, ...chunks.flatMap(({ frames }, i) => [i + 1, frames, 1]))),
    fullBox('stsz', 0, 0, u32(0, sizes.length, ...sizes)),
    wide
      ? fullBox('co64', 0, 0, u32(offsets.length), u64(...offsets))
      : fullBox('stco', 0, 0, u32(offsets.length, ...offsets)),
  );
}

/** How the frames are coded (ISO/IEC 14496-15, section 5.4.2.1): BT.709 colours in the range of broadcasts. */
function sampleEntry({ widthPx, heightPx }: FilmFacts, avcC: Uint8Array): Uint8Array<ArrayBuffer> {
  const dotsAnInch = 72 * 0x10000;
  const opaque = 24;
  return box(
    'avc1',
    zeros(6),
    u16(1),
    zeros(16),
    u16(widthPx, heightPx),
    u32(dotsAnInch, dotsAnInch, 0),
    u16(1),
    zeros(32),
    u16(opaque, 0xffff),
    box('avcC', avcC),
    box('colr', letters('nclx'), u16(1, 1, 1), zeros(1)),
  );
}

/** What the film is, as the common players show it: a list of named texts in a metadata box (QuickTime File Format). */
function userData({ metadata }: FilmFacts): Uint8Array<ArrayBuffer> {
  const utf8Text = 1;
  const item = (name: string, text: string) => box(name, box('data', u32(utf8Text, 0), utf8Bytes(text)));
  const items = [
    item('©nam', metadata.title),
    item('desc', metadata.description),
    item('©cmt', studyText(metadata)),
    item('©too', metadata.software),
  ];
  if (metadata.credit !== '') items.push(item('cprt', metadata.credit));
  const handler = fullBox('hdlr', 0, 0, u32(0), letters('mdirappl'), zeros(8), zeros(1));
  return box('udta', fullBox('meta', 0, 0, handler, box('ilst', ...items)));
}
