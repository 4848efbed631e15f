import { utf8Bytes } from '../../../../shared-core/base/textCoding.ts';
import type { ByteSink } from '../../write/sink.ts';
import { element, float64, openElement, unsigned } from './ebml.ts';
import { type EncodedFrame, type FilmFacts, type FilmFile, joined, studyText } from './filmFile.ts';

/** Identifiers of Matroska (RFC 9559, section 5.1), of which WebM is a part. */
const ID = {
  ebml: 0x1a45dfa3,
  ebmlVersion: 0x4286,
  ebmlReadVersion: 0x42f7,
  maxIdLength: 0x42f2,
  maxSizeLength: 0x42f3,
  docType: 0x4282,
  docTypeVersion: 0x4287,
  docTypeReadVersion: 0x4285,
  segment: 0x18538067,
  info: 0x1549a966,
  timestampScale: 0x2ad7b1,
  duration: 0x4489,
  title: 0x7ba9,
  muxingApp: 0x4d80,
  writingApp: 0x5741,
  tracks: 0x1654ae6b,
  trackEntry: 0xae,
  trackNumber: 0xd7,
  trackUid: 0x73c5,
  trackType: 0x83,
  flagLacing: 0x9c,
  defaultDuration: 0x23e383,
  codecId: 0x86,
  video: 0xe0,
  pixelWidth: 0xb0,
  pixelHeight: 0xba,
  colour: 0x55b0,
  matrixCoefficients: 0x55b1,
  bitsPerChannel: 0x55b2,
  chromaSubsamplingHorz: 0x55b3,
  chromaSubsamplingVert: 0x55b4,
  range: 0x55b9,
  transferCharacteristics: 0x55ba,
  primaries: 0x55bb,
  tags: 0x1254c367,
  tag: 0x7373,
  targets: 0x63c0,
  simpleTag: 0x67c8,
  tagName: 0x45a3,
  tagString: 0x4487,
  cluster: 0x1f43b675,
  timestamp: 0xe7,
  simpleBlock: 0xa3,
} as const;

/** ITU-T H.273: 1 is BT.709 for primaries, transfer and matrix. */
const BT709 = 1;
const BROADCAST_RANGE = 1;
const NS_PER_MS = 1e6;
const KEY_FLAG = 0x80;

/**
 * A WebM file with one VP9 track. Frames gather in clusters that begin with a key frame. Nothing is known of the whole
 * when its beginning is written, so the segment's length is left unknown, which Matroska allows (RFC 9559, section
 * 5.1), and there is no index, which players do without.
 */
export class WebmFile implements FilmFile {
  private readonly sink: ByteSink;
  private readonly facts: FilmFacts;
  private frame = 0;
  private clusterStartMs = 0;
  private held: Uint8Array[] = [];

  private constructor(sink: ByteSink, facts: FilmFacts) {
    this.sink = sink;
    this.facts = facts;
  }

  static async open(sink: ByteSink, facts: FilmFacts): Promise<WebmFile> {
    await sink.write(joined([header(), openElement(ID.segment), info(facts), tracks(facts), tags(facts)]));
    return new WebmFile(sink, facts);
  }

  async add({ bytes, key }: EncodedFrame): Promise<void> {
    const ms = Math.round((this.frame++ * 1000) / this.facts.framesPerSecond);
    if (key) {
      await this.flush();
      this.clusterStartMs = ms;
    }
    const after = ms - this.clusterStartMs;
    // SimpleBlock (section 10.2): track 1 as a number of variable size, the time after the cluster's, flags.
    const head = Uint8Array.of(0x81, after >> 8, after & 0xff, key ? KEY_FLAG : 0);
    this.held.push(element(ID.simpleBlock, head, bytes));
  }

  async end(): Promise<void> {
    await this.flush();
    if (this.frame !== this.facts.frames)
      throw new Error(`${this.frame} of ${this.facts.frames} frames came from the encoder`);
  }

  private async flush(): Promise<void> {
    if (this.held.length === 0) return;
    const blocks = this.held;
    this.held = [];
    await this.sink.write(
      element(ID.cluster, element(ID.timestamp, unsigned(this.clusterStartMs)), ...blocks),
    );
  }
}

const header = (): Uint8Array =>
  element(
    ID.ebml,
    element(ID.ebmlVersion, unsigned(1)),
    element(ID.ebmlReadVersion, unsigned(1)),
    element(ID.maxIdLength, unsigned(4)),
    element(ID.maxSizeLength, unsigned(8)),
    element(ID.docType, utf8Bytes('webm')),
    element(ID.docTypeVersion, unsigned(4)),
    element(ID.docTypeReadVersion, unsigned(2)),
  );

const info = ({ frames, framesPerSecond, metadata }: FilmFacts): Uint8Array =>
  element(
    ID.info,
    element(ID.timestampScale, unsigned(NS_PER_MS)),
    element(ID.duration, float64((frames * 1000) / framesPerSecond)),
    element(ID.title, utf8Bytes(metadata.title)),
    element(ID.muxingApp, utf8Bytes(metadata.software)),
    element(ID.writingApp, utf8Bytes(metadata.software)),
  );

const tracks = ({ widthPx, heightPx, framesPerSecond }: FilmFacts): Uint8Array =>
  element(
    ID.tracks,
    element(
      ID.trackEntry,
      element(ID.trackNumber, unsigned(1)),
      element(ID.trackUid, unsigned(1)),
      element(ID.trackType, unsigned(1)),
      element(ID.flagLacing, unsigned(0)),
      element(ID.defaultDuration, unsigned(Math.round(1e9 / framesPerSecond))),
      element(ID.codecId, utf8Bytes('V_VP9')),
      element(
        ID.video,
        element(ID.pixelWidth, unsigned(widthPx)),
        element(ID.pixelHeight, unsigned(heightPx)),
        element(
          ID.colour,
          element(ID.matrixCoefficients, unsigned(BT709)),
          element(ID.bitsPerChannel, unsigned(8)),
          element(ID.chromaSubsamplingHorz, unsigned(1)),
          element(ID.chromaSubsamplingVert, unsigned(1)),
          element(ID.range, unsigned(BROADCAST_RANGE)),
          element(ID.transferCharacteristics, unsigned(BT709)),
          element(ID.primaries, unsigned(BT709)),
        ),
      ),
    ),
  );

/** Names of IANA's registry of Matroska tag names, and the study under one of our own. */
function tags({ metadata }: FilmFacts): Uint8Array {
  const texts: (readonly [string, string])[] = [
    ['TITLE', metadata.title],
    ['DESCRIPTION', metadata.description],
    ['STUDY', studyText(metadata)],
  ];
  if (metadata.credit !== '') texts.push(['COPYRIGHT', metadata.credit]);
  const simple = texts.map(([name, text]) =>
    element(ID.simpleTag, element(ID.tagName, utf8Bytes(name)), element(ID.tagString, utf8Bytes(text))),
  );
  return element(ID.tags, element(ID.tag, element(ID.targets), ...simple));
}
