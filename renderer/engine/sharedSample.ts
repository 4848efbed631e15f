import type { SortedSample } from '../../shared-core/shells/sample.ts';

/** A sample whose arrays lie in shared memory, so that sending it to the page costs the page nothing. */
export function sharedSample(sample: SortedSample): SortedSample {
  const { count, redshift, order, sumRedshift, weighted } = sample;
  const sharedOrder = new Uint32Array(new SharedArrayBuffer(order.byteLength));
  sharedOrder.set(order);
  return {
    count,
    redshift: shared(redshift),
    order: sharedOrder,
    sumRedshift: shared(sumRedshift),
    weighted: weighted && {
      sumWeight: shared(weighted.sumWeight),
      sumWeightSquared: shared(weighted.sumWeightSquared),
      sumWeightRedshift: shared(weighted.sumWeightRedshift),
    },
  };
}

function shared(values: Float64Array): Float64Array {
  const copy = new Float64Array(new SharedArrayBuffer(values.byteLength));
  copy.set(values);
  return copy;
}
