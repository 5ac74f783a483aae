/**
 * An order of the cells of a grid that shows the whole map early: every beginning of it lies spread over all axes, and
 * each doubling halves the gaps. It sorts by the reversed bits of the Morton code, van der Corput's sequence over
 * several axes; bits count from the top of each axis, so that long axes are not preferred.
 *
 * @param lengths  cells along each axis, the last running fastest
 * @returns        every index from 0 to the product less one, once
 */
export function coarseToFine(lengths: readonly number[]): Uint32Array {
  const bits = lengths.map((length) => Math.max(0, Math.ceil(Math.log2(length))));
  const most = Math.max(...bits);
  const size = lengths.reduce((product, length) => product * length, 1);
  const keys = Float64Array.from({ length: size }, (_, index) => keyOf(lengths, bits, most, index));
  return Uint32Array.from({ length: size }, (_, index) => index).sort((a, b) => keys[a] - keys[b]);
}

/** The highest bits of every axis together have the least weight, the lowest bits the most. */
function keyOf(lengths: readonly number[], bits: readonly number[], most: number, index: number): number {
  let key = 0;
  let weight = 1;
  for (let depth = 1; depth <= most; depth++) {
    let rest = index;
    for (let axis = lengths.length - 1; axis >= 0; axis--) {
      const at = rest % lengths[axis];
      rest = Math.floor(rest / lengths[axis]);
      if (depth > bits[axis]) continue;
      if ((at >> (bits[axis] - depth)) & 1) key += weight;
      weight *= 2;
    }
  }
  return key;
}
