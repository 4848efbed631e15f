import { type Code, I32, op, V128, wide } from './assembler.ts';

/**
 * Byte offsets in the block of parameters that `run` reads. Floats unless marked; the discs' weights stand twice each,
 * so that one load meets light and light times value.
 */
export const PARAMETER = {
  /** 12 floats. */
  matrix: 0,
  low: 48,
  right: 52,
  bottom: 56,
  nearest: 60,
  full: 64,
  dimmed: 68,
  emphasisMin: 72,
  emphasisMax: 76,
  byte: 80,
  shift: 84,
  four: 88,
  /** Integers from here on: pixels in a row, and the first pixel behind the free border. */
  stride: 92,
  origin: 96,
  /** Side of the discs, 0 for single pixels; bytes of one disc; bytes from one row of the sums to the next. */
  side: 100,
  discBytes: 104,
  rowBytes: 108,
  /** Addresses. */
  x: 112,
  y: 116,
  z: 120,
  radius: 124,
  value: 128,
  sums: 132,
  discs: 136,
  /** Four floats, and the two that they stay between; whether they count at all (an integer). */
  depth: 140,
  least: 156,
  one: 160,
  cued: 164,
  size: 176,
} as const;

const P = PARAMETER;

// Locals: parameters first, then as declared below.
const [FROM, TO, PARAMS] = [0, 1, 2];
const [OFFSET, MASK, ADDRESS, DISC, ROW, COLUMN, SUMS] = [3, 4, 5, 6, 7, 8, 9];
const [M, X, Y, Z, R, PX, PY, LIGHT, TINTED, INDEX, PAIRS01, PAIRS23, PAIR, PLACE, TEST] = [
  10, 22, 23, 24, 25, 26, 27, 28, 29, 30, 31, 32, 33, 34, 35,
];

const parameter = (offset: number): number[] => [...op.get(PARAMS), ...op.i32Load(offset)];
const spread = (offset: number): number[] => [...op.get(PARAMS), ...wide.load32Splat(offset)];

/** Four floats of an array from the slot on: address of the array plus four bytes a slot. */
const four = (array: number): number[] => [
  ...parameter(array),
  ...op.get(OFFSET),
  ...op.i32Add,
  ...wide.load(),
];

/** Four numbers times (X, Y, Z, 1), in the order ((a X + b Y) + c Z) + d. */
const timesPoint = (number: (nth: number) => number[]): number[] => [
  ...number(0),
  ...op.get(X),
  ...wide.f32Mul,
  ...number(1),
  ...op.get(Y),
  ...wide.f32Mul,
  ...wide.f32Add,
  ...number(2),
  ...op.get(Z),
  ...wide.f32Mul,
  ...wide.f32Add,
  ...number(3),
  ...wide.f32Add,
];

/** Row of the matrix times the points. */
const rowTimesPoint = (row: number): number[] => timesPoint((nth) => op.get(M + 4 * row + nth));

const inside = (coordinate: number, end: number): number[] => [
  ...op.get(coordinate),
  ...spread(P.low),
  ...wide.f32Ge,
  ...wide.and,
  ...op.get(coordinate),
  ...spread(end),
  ...wide.f32Lt,
  ...wide.and,
];

/** Projection of four points; leaves PX, PY, LIGHT, TINTED and the bits of those that are in the picture in MASK. */
const projectFour: number[] = [
  ...four(P.radius),
  ...op.set(R),
  ...([X, Y, Z] as const).flatMap((axis, i) => [
    ...four([P.x, P.y, P.z][i]!),
    ...op.get(R),
    ...wide.f32Mul,
    ...op.set(axis),
  ]),
  ...rowTimesPoint(2),
  ...op.set(TEST),
  ...rowTimesPoint(0),
  ...op.get(TEST),
  ...wide.f32Div,
  ...op.set(PX),
  ...rowTimesPoint(1),
  ...op.get(TEST),
  ...wide.f32Div,
  ...op.set(PY),
  ...op.get(TEST),
  ...spread(P.nearest),
  ...wide.f32Gt,
  ...inside(PX, P.right),
  ...inside(PY, P.bottom),
  ...wide.i32Bitmask,
  ...op.set(MASK),
];

const lightOfFour: number[] = [
  ...spread(P.full),
  ...spread(P.dimmed),
  ...op.get(R),
  ...spread(P.emphasisMin),
  ...wide.f32Ge,
  ...op.get(R),
  ...spread(P.emphasisMax),
  ...wide.f32Lt,
  ...wide.and,
  ...wide.bitselect,
  ...op.set(LIGHT),
  ...parameter(P.cued),
  ...op.if,
  ...timesPoint((nth) => spread(P.depth + 4 * nth)),
  ...spread(P.least),
  ...wide.f32Max,
  ...spread(P.one),
  ...wide.f32Min,
  ...op.get(LIGHT),
  ...wide.f32Mul,
  ...op.set(LIGHT),
  ...op.end,
  ...op.get(LIGHT),
  // Four bytes of colour value, widened.
  ...parameter(P.value),
  ...op.get(FROM),
  ...op.i32Add,
  ...wide.load32Zero(),
  ...wide.i16ExtendLowU8,
  ...wide.i32ExtendLowU16,
  ...wide.f32FromI32,
  ...spread(P.byte),
  ...wide.f32Mul,
  ...wide.f32Mul,
  ...op.set(TINTED),
  ...op.get(LIGHT),
  ...op.get(TINTED),
  ...wide.shuffle([0, 1, 2, 3, 16, 17, 18, 19, 4, 5, 6, 7, 20, 21, 22, 23]),
  ...op.set(PAIRS01),
  ...op.get(LIGHT),
  ...op.get(TINTED),
  ...wide.shuffle([8, 9, 10, 11, 24, 25, 26, 27, 12, 13, 14, 15, 28, 29, 30, 31]),
  ...op.set(PAIRS23),
];

/** INDEX = address of each point's pixel, from whole coordinates on the stack (x, then y). */
const addressOfFour: number[] = [
  ...spread(P.stride),
  ...wide.i32Mul,
  ...wide.i32Add,
  ...spread(P.origin),
  ...wide.i32Add,
  ...op.i32(3),
  ...wide.i32Shl,
  ...op.get(SUMS),
  ...wide.i32Splat,
  ...wide.i32Add,
  ...op.set(INDEX),
];

const pairsOf = (lane: number): number => (lane < 2 ? PAIRS01 : PAIRS23);

/** One pixel takes all: sums of the lane's pixel plus (light, tinted). */
const addPixel = (lane: number): number[] => [
  ...op.get(MASK),
  ...op.i32(1 << lane),
  ...op.i32And,
  ...op.if,
  ...op.get(INDEX),
  ...wide.i32Extract(lane),
  ...op.tee(ADDRESS),
  ...op.get(ADDRESS),
  ...(lane % 2 === 0 ? wide.load64Zero() : wide.load64Splat()),
  ...op.get(pairsOf(lane)),
  ...wide.f32Add,
  ...wide.store64Lane(lane % 2),
  ...op.end,
];

/** A disc: rows of pairs of pixels, each plus the weight times (light, tinted). */
const addDisc = (lane: number): number[] => [
  ...op.get(MASK),
  ...op.i32(1 << lane),
  ...op.i32And,
  ...op.if,
  ...op.get(pairsOf(lane)),
  ...op.get(pairsOf(lane)),
  ...wide.shuffle(
    lane % 2 === 0
      ? [0, 1, 2, 3, 4, 5, 6, 7, 0, 1, 2, 3, 4, 5, 6, 7]
      : [8, 9, 10, 11, 12, 13, 14, 15, 8, 9, 10, 11, 12, 13, 14, 15],
  ),
  ...op.set(PAIR),
  ...op.get(PLACE),
  ...wide.i32Extract(lane),
  ...parameter(P.discBytes),
  ...op.i32Mul,
  ...parameter(P.discs),
  ...op.i32Add,
  ...op.set(DISC),
  ...op.get(INDEX),
  ...wide.i32Extract(lane),
  ...op.set(ADDRESS),
  ...op.i32(0),
  ...op.set(ROW),
  ...op.loop,
  ...op.i32(0),
  ...op.set(COLUMN),
  ...op.loop,
  ...op.get(ADDRESS),
  ...op.get(COLUMN),
  ...op.i32Add,
  ...op.get(ADDRESS),
  ...op.get(COLUMN),
  ...op.i32Add,
  ...wide.load(),
  ...op.get(DISC),
  ...wide.load(),
  ...op.get(PAIR),
  ...wide.f32Mul,
  ...wide.f32Add,
  ...wide.store(),
  ...op.get(DISC),
  ...op.i32(16),
  ...op.i32Add,
  ...op.set(DISC),
  ...op.get(COLUMN),
  ...op.i32(16),
  ...op.i32Add,
  ...op.tee(COLUMN),
  ...parameter(P.side),
  ...op.i32(3),
  ...op.i32Shl,
  ...op.i32LtU,
  ...op.brIf(0),
  ...op.end,
  ...op.get(ADDRESS),
  ...parameter(P.rowBytes),
  ...op.i32Add,
  ...op.set(ADDRESS),
  ...op.get(ROW),
  ...op.i32(1),
  ...op.i32Add,
  ...op.tee(ROW),
  ...parameter(P.side),
  ...op.i32LtU,
  ...op.brIf(0),
  ...op.end,
  ...op.end,
];

/** floor(p + shift) of a coordinate as a float, kept in TEST; the quarter of the place between pixels is left behind. */
const corner = (coordinate: number): number[] => [
  ...op.get(coordinate),
  ...spread(P.shift),
  ...wide.f32Add,
  ...op.tee(coordinate),
  ...wide.f32Floor,
  ...op.set(TEST),
  ...op.get(coordinate),
  ...op.get(TEST),
  ...wide.f32Sub,
  ...spread(P.four),
  ...wide.f32Mul,
  ...wide.i32TruncF32,
  // The coordinate becomes its corner.
  ...op.get(TEST),
  ...op.set(coordinate),
];

const pixels: number[] = [
  ...op.get(PX),
  ...wide.i32TruncF32,
  ...op.get(PY),
  ...wide.i32TruncF32,
  ...addressOfFour,
  ...[0, 1, 2, 3].flatMap(addPixel),
];

const discs: number[] = [
  ...corner(PY),
  ...op.i32(2),
  ...wide.i32Shl,
  ...corner(PX),
  ...wide.i32Add,
  ...op.set(PLACE),
  ...op.get(PX),
  ...wide.i32TruncF32,
  ...op.get(PY),
  ...wide.i32TruncF32,
  ...addressOfFour,
  ...[0, 1, 2, 3].flatMap(addDisc),
];

const body: number[] = [
  ...Array.from({ length: 12 }, (_, i) => [...spread(P.matrix + 4 * i), ...op.set(M + i)]).flat(),
  ...parameter(P.sums),
  ...op.set(SUMS),
  ...op.block,
  ...op.loop,
  ...op.get(FROM),
  ...op.get(TO),
  ...op.i32LtU,
  ...op.i32Eqz,
  ...op.brIf(1),
  ...op.get(FROM),
  ...op.i32(2),
  ...op.i32Shl,
  ...op.set(OFFSET),
  ...projectFour,
  ...op.get(MASK),
  ...op.if,
  ...lightOfFour,
  ...parameter(P.side),
  ...op.i32Eqz,
  ...op.if,
  ...pixels,
  ...op.else,
  ...discs,
  ...op.end,
  ...op.end,
  ...op.get(FROM),
  ...op.i32(4),
  ...op.i32Add,
  ...op.set(FROM),
  ...op.br(0),
  ...op.end,
  ...op.end,
];

/**
 * The splat of splat.ts, four points at a time: splat(from, to, parameters), slots in groups of four, the parameters laid
 * out as in PARAMETER.
 */
export const SPLAT: Code = {
  name: 'splat',
  parameters: 3,
  locals: [
    [7, I32],
    [26, V128],
  ],
  body,
};
