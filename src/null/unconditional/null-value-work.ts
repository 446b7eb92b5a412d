// Forecast of the work that `nullValueP` takes.

/** Counted work in units of about 30 ns. */
export function nullValueWork({ firstSize, secondSize }: { firstSize: number; secondSize: number }): number {
  const outcomes = (firstSize + 1) * (secondSize + 1);
  const total = firstSize + secondSize;
  return Math.round((outcomes * total) / 20 + 12 * outcomes + 3 * total * total + 1000);
}
