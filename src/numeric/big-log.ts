// Natural logarithms of whole numbers in fixed point, to as many bits as asked: used only to order two products that are
// known to differ but agree to sixteen digits.

const cache = new Map<string, bigint>();

/**
 * ln n scaled by 2^bits, as a whole number; 1 <= n < 2^64. Its error is below 256 bits units in the last place: each of
 * at most bits/3 terms loses at most 2 units, twice that for the factor 2, and ln 2 enters at most 64 times.
 */
export function bigLog(n: bigint, bits: number): bigint {
  if (n === 1n) return 0n;
  const key = `${n}/${bits}`;
  const known = cache.get(key);
  if (known !== undefined) return known;
  const length = BigInt(n.toString(2).length - 1);
  const reduced = logNearOne(n, 1n << length, bits);
  const result = length === 0n ? reduced : reduced + length * logNearOne(2n, 1n, bits);
  if (cache.size > 20_000) cache.clear();
  cache.set(key, result);
  return result;
}

/** ln(a/b) for 1 <= a/b <= 2 by 2 artanh((a - b)/(a + b)); each of the at most bits/3 terms is truncated once. */
function logNearOne(a: bigint, b: bigint, bits: number): bigint {
  const scale = BigInt(bits);
  const y = ((a - b) << scale) / (a + b);
  const square = (y * y) >> scale;
  let power = y;
  let sum = 0n;
  for (let k = 1n; power > 0n; k += 2n) {
    sum += power / k;
    power = (power * square) >> scale;
  }
  return 2n * sum;
}
