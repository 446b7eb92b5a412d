// The exponential function in fixed point, to as many bits as asked: used only to tell sums of radicals apart.
import { bigLog } from './big-log.js';

const halvings = 16;
const guard = 64;

/**
 * prod g^(f/b) scaled by 2^bits, for whole g from 1 to 2^53 and fractions f/b in [0, 1), at most 1,000 of them. Relative
 * error below 2^-bits (bits < 2^20): with 64 guard bits, the logarithms and the multiple of ln 2 taken out are off by at most
 * (1,000 + 2^16) x 256 (bits + 64) units, the series and its 16 squarings by 2^24 more - below 2^63 units together.
 */
export function productOfRoots(
  parts: readonly { readonly g: bigint; readonly f: bigint }[],
  b: bigint,
  bits: number,
): bigint {
  const work = bits + guard;
  const exponent = parts.reduce((sum, { g, f }) => sum + (f * bigLog(g, work)) / b, 0n);
  const logTwo = bigLog(2n, work);
  const doublings = exponent / logTwo;
  const scale = BigInt(work);
  const small = (exponent - doublings * logTwo) >> BigInt(halvings);
  let value = 1n << scale;
  let term = value;
  for (let k = 1n; term > 0n; k++) {
    term = ((term * small) >> scale) / k;
    value += term;
  }
  for (let k = 0; k < halvings; k++) value = (value * value) >> scale;
  const shift = doublings - BigInt(guard);
  return shift >= 0n ? value << shift : value >> -shift;
}
