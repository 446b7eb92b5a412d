// Forecast of the work that `unconditionalP` takes.

/** Counted work in units of about 30 ns. */
export function unconditionalWork({ firstSize, secondSize }: { firstSize: number; secondSize: number }): number {
  const total = firstSize + secondSize;
  return Math.round(3 * (firstSize + 1) * (secondSize + 1) + 2.5 * total * total + 1000);
}
