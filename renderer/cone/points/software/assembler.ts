/** Bytes of WebAssembly, put together by hand. Numbers and sections as in the core specification, chapter 5. */

export const I32 = 0x7f;
export const V128 = 0x7b;

/** Unsigned LEB128. */
export function u32(value: number): number[] {
  const out: number[] = [];
  let rest = value >>> 0;
  do {
    const low = rest & 0x7f;
    rest >>>= 7;
    out.push(rest === 0 ? low : low | 0x80);
  } while (rest !== 0);
  return out;
}

/** Signed LEB128 of a 32-bit integer. */
export function s32(value: number): number[] {
  const out: number[] = [];
  let rest = value | 0;
  for (;;) {
    const low = rest & 0x7f;
    rest >>= 7;
    const done = (rest === 0 && (low & 0x40) === 0) || (rest === -1 && (low & 0x40) !== 0);
    out.push(done ? low : low | 0x80);
    if (done) return out;
  }
}

const section = (id: number, content: readonly number[]): number[] => [
  id,
  ...u32(content.length),
  ...content,
];
const vector = (items: readonly (readonly number[])[]): number[] => [...u32(items.length), ...items.flat()];
const text = (s: string): number[] => [...u32(s.length), ...Array.from(s, (c) => c.charCodeAt(0))];

/** Instructions, each as its bytes. Memory operands: alignment exponent 0 is always allowed. */
export const op = {
  get: (local: number) => [0x20, ...u32(local)],
  set: (local: number) => [0x21, ...u32(local)],
  tee: (local: number) => [0x22, ...u32(local)],
  i32: (value: number) => [0x41, ...s32(value)],
  f32: (value: number) => [0x43, ...new Uint8Array(Float32Array.of(value).buffer)],
  i64Zero: [0x42, 0],
  i32Add: [0x6a],
  i32Sub: [0x6b],
  i32Mul: [0x6c],
  i32And: [0x71],
  i32Shl: [0x74],
  i32LtU: [0x49],
  i32LtS: [0x48],
  i32GtS: [0x4a],
  i32Eqz: [0x45],
  i32ShrU: [0x76],
  i32Load: (offset = 0) => [0x28, 0, ...u32(offset)],
  i64Load: (offset = 0) => [0x29, 0, ...u32(offset)],
  f32Load: (offset = 0) => [0x2a, 0, ...u32(offset)],
  i32Store: (offset = 0) => [0x36, 0, ...u32(offset)],
  i64Store: (offset = 0) => [0x37, 0, ...u32(offset)],
  i64Eqz: [0x50],
  f32Add: [0x92],
  f32Mul: [0x94],
  f32Div: [0x95],
  i32TruncF32: [0xfc, 0x00],
  select: [0x1b],
  else: [0x05],
  block: [0x02, 0x40],
  loop: [0x03, 0x40],
  if: [0x04, 0x40],
  end: [0x0b],
  br: (depth: number) => [0x0c, ...u32(depth)],
  brIf: (depth: number) => [0x0d, ...u32(depth)],
} as const;

const simd = (code: number): number[] => [0xfd, ...u32(code)];

/** Four-wide instructions; codes of the fixed-width SIMD part of the core specification. */
export const wide = {
  load: (offset = 0) => [...simd(0), 0, ...u32(offset)],
  load32Splat: (offset: number) => [...simd(9), 0, ...u32(offset)],
  load64Splat: (offset = 0) => [...simd(10), 0, ...u32(offset)],
  load32Zero: (offset = 0) => [...simd(92), 0, ...u32(offset)],
  load64Zero: (offset = 0) => [...simd(93), 0, ...u32(offset)],
  store: (offset = 0) => [...simd(11), 0, ...u32(offset)],
  store64Lane: (lane: number) => [...simd(91), 0, ...u32(0), lane],
  shuffle: (lanes: readonly number[]) => [...simd(13), ...lanes],
  and: simd(78),
  bitselect: simd(82),
  i32Extract: (lane: number) => [...simd(27), lane],
  i32Splat: simd(17),
  i16ExtendLowU8: simd(137),
  i32ExtendLowU16: simd(169),
  i32Bitmask: simd(164),
  i32Add: simd(174),
  i32Mul: simd(181),
  i32Shl: simd(171),
  f32Ge: simd(70),
  f32Gt: simd(68),
  f32Lt: simd(67),
  f32Add: simd(228),
  f32Sub: simd(229),
  f32Mul: simd(230),
  f32Div: simd(231),
  f32Min: simd(232),
  f32Max: simd(233),
  f32Floor: simd(104),
  i32TruncF32: simd(248),
  f32FromI32: simd(250),
} as const;

/** A function of i32 parameters that answers nothing. */
export interface Code {
  readonly name: string;
  readonly parameters: number;
  readonly locals: readonly (readonly [count: number, type: number])[];
  readonly body: readonly number[];
}

/** A module of functions, exported by their names, over the imported memory `env.memory`. */
export function module(functions: readonly Code[], shared: boolean): Uint8Array<ArrayBuffer> {
  const limits = shared ? [0x03, ...u32(1), ...u32(65536)] : [0x00, ...u32(1)];
  const type = ({ parameters }: Code) => [
    0x60,
    ...vector(Array.from({ length: parameters }, () => [I32])),
    0,
  ];
  const code = ({ locals, body }: Code): number[] => {
    const bytes = [...vector(locals.map(([count, t]) => [...u32(count), t])), ...body, ...op.end];
    return [...u32(bytes.length), ...bytes];
  };
  return Uint8Array.from([
    ...[0x00, 0x61, 0x73, 0x6d, 0x01, 0x00, 0x00, 0x00],
    ...section(1, vector(functions.map(type))),
    ...section(2, vector([[...text('env'), ...text('memory'), 0x02, ...limits]])),
    ...section(3, vector(functions.map((_, i) => u32(i)))),
    ...section(7, vector(functions.map(({ name }, i) => [...text(name), 0x00, ...u32(i)]))),
    ...section(10, vector(functions.map(code))),
  ]);
}
