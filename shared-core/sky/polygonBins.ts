/** Edges widened in longitude by this, far above rounding, so that a bin also holds points that lie on an edge. */
const PADDING_DEG = 1e-4;

/** What the edges of a polygon look like along the meridians of some frame; one entry an edge, degrees. */
export interface EdgeSpans {
  readonly count: number;
  readonly westDeg: Float64Array;
  readonly eastDeg: Float64Array;
  readonly latMinDeg: Float64Array;
  readonly latMaxDeg: Float64Array;
}

/** Meridians in bins of equal width; above and below all edges of a bin the answer is known at once. */
export interface MeridianBins {
  readonly count: number;
  /** Edge numbers of bin i: edges[first[i]] to edges[first[i + 1] - 1]. */
  readonly first: Int32Array;
  readonly edges: Int32Array;
  readonly latMinDeg: Float64Array;
  readonly latMaxDeg: Float64Array;
  /** 1 where an odd number of edges lies between the bin's far south and its far north. */
  readonly oddBelow: Uint8Array;
}

/** Half-open in longitude, so that a meridian through a vertex meets one of its two edges, or both or none. */
export function spansMeridian(spans: EdgeSpans, edge: number, lonDeg: number): boolean {
  const west = spans.westDeg[edge]!;
  const east = spans.eastDeg[edge]!;
  return west <= east ? lonDeg >= west && lonDeg < east : lonDeg >= west || lonDeg < east;
}

/** About four bins an edge keep the lists short. */
export function binEdges(spans: EdgeSpans): MeridianBins {
  const count = Math.min(1 << 16, Math.max(360, 4 * spans.count));
  const binDeg = 360 / count;
  const lists: number[][] = Array.from({ length: count }, () => []);
  const latMinDeg = new Float64Array(count).fill(Number.POSITIVE_INFINITY);
  const latMaxDeg = new Float64Array(count).fill(Number.NEGATIVE_INFINITY);
  for (let i = 0; i < spans.count; i++) {
    const west = spans.westDeg[i]!;
    const east = spans.eastDeg[i]! < west ? spans.eastDeg[i]! + 360 : spans.eastDeg[i]!;
    const from = Math.floor((west - PADDING_DEG) / binDeg);
    const to = Math.floor((east + PADDING_DEG) / binDeg);
    for (let k = from; k <= to; k++) {
      const bin = ((k % count) + count) % count;
      lists[bin]!.push(i);
      latMinDeg[bin] = Math.min(latMinDeg[bin]!, spans.latMinDeg[i]!);
      latMaxDeg[bin] = Math.max(latMaxDeg[bin]!, spans.latMaxDeg[i]!);
    }
  }
  const first = new Int32Array(count + 1);
  for (let i = 0; i < count; i++) first[i + 1] = first[i]! + lists[i]!.length;
  const edges = new Int32Array(first[count]!);
  const oddBelow = new Uint8Array(count);
  for (let i = 0; i < count; i++) {
    edges.set(lists[i]!, first[i]!);
    // South of every edge of the bin nothing is crossed when the meridian moves, so one meridian answers for all.
    const middle = (i + 0.5) * binDeg;
    let crossed = 0;
    for (const edge of lists[i]!) if (spansMeridian(spans, edge, middle)) crossed++;
    oddBelow[i] = crossed % 2;
  }
  return { count, first, edges, latMinDeg, latMaxDeg, oddBelow };
}
