/** What a level of a codec lets a decoder be asked for. */
interface Level {
  readonly name: string;
  readonly pictureSize: number;
  readonly rate: number;
  readonly side: number;
}

/** Luma samples of a frame, of a second, and longest side: webmproject.org/vp9/levels. */
const VP9_LEVELS: readonly Level[] = [
  { name: '10', pictureSize: 36_864, rate: 829_440, side: 512 },
  { name: '11', pictureSize: 73_728, rate: 2_764_800, side: 768 },
  { name: '20', pictureSize: 122_880, rate: 4_608_000, side: 960 },
  { name: '21', pictureSize: 245_760, rate: 9_216_000, side: 1344 },
  { name: '30', pictureSize: 552_960, rate: 20_736_000, side: 2048 },
  { name: '31', pictureSize: 983_040, rate: 36_864_000, side: 2752 },
  { name: '40', pictureSize: 2_228_224, rate: 83_558_400, side: 4160 },
  { name: '41', pictureSize: 2_228_224, rate: 160_432_128, side: 4160 },
  { name: '50', pictureSize: 8_912_896, rate: 311_951_360, side: 8384 },
  { name: '51', pictureSize: 8_912_896, rate: 588_251_136, side: 8384 },
];

/**
 * Blocks of 16 by 16 samples, of a frame and of a second, and thousands of bits a second: ITU-T H.264, table A-1. Sides
 * are at most sqrt(8 blocks).
 */
const H264_LEVELS: readonly (Omit<Level, 'side'> & { readonly kiloBits: number })[] = [
  { name: '1E', pictureSize: 1620, rate: 40_500, kiloBits: 10_000 },
  { name: '1F', pictureSize: 3600, rate: 108_000, kiloBits: 14_000 },
  { name: '20', pictureSize: 5120, rate: 216_000, kiloBits: 20_000 },
  { name: '28', pictureSize: 8192, rate: 245_760, kiloBits: 20_000 },
  { name: '29', pictureSize: 8192, rate: 245_760, kiloBits: 50_000 },
  { name: '2A', pictureSize: 8704, rate: 522_240, kiloBits: 50_000 },
  { name: '32', pictureSize: 22_080, rate: 589_824, kiloBits: 135_000 },
  { name: '33', pictureSize: 36_864, rate: 983_040, kiloBits: 240_000 },
  { name: '34', pictureSize: 36_864, rate: 2_073_600, kiloBits: 240_000 },
];

/** Bits a second that no level goes beyond. */
export const MOST_H264_BITS = 240e6;

interface FrameRate {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly framesPerSecond: number;
}

/** The codec's name with the least level that holds the film (VP Codec ISO Media File Format Binding): profile 0, 8 bits. */
export function vp9Codec({ widthPx, heightPx, framesPerSecond }: FrameRate): string {
  const size = widthPx * heightPx;
  const level = VP9_LEVELS.find(
    ({ pictureSize, rate, side }) =>
      size <= pictureSize && size * framesPerSecond <= rate && Math.max(widthPx, heightPx) <= side,
  );
  return `vp09.00.${(level ?? VP9_LEVELS.at(-1)!).name}.08`;
}

/** The same for H.264 (RFC 6381, section 3.3): High, Main and Baseline profile, the better first. */
export function h264Codecs(
  { widthPx, heightPx, framesPerSecond }: FrameRate,
  bitsPerSecond: number,
): string[] {
  const [across, down] = [Math.ceil(widthPx / 16), Math.ceil(heightPx / 16)];
  const size = across * down;
  const level = H264_LEVELS.find(
    ({ pictureSize, rate, kiloBits }) =>
      size <= pictureSize &&
      size * framesPerSecond <= rate &&
      bitsPerSecond <= 1000 * kiloBits &&
      Math.max(across, down) <= Math.sqrt(8 * pictureSize),
  );
  return ['6400', '4D40', '42E0'].map((profile) => `avc1.${profile}${(level ?? H264_LEVELS.at(-1)!).name}`);
}
