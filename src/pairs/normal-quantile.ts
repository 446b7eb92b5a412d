// The quantile of the standard normal law that an interval of a given level is wide by.

/** z with P(-z < Z < z) = confidence. */
export async function normalQuantile(confidence: number): Promise<number> {
  const { jStat } = await import('jstat');
  return jStat.normal.inv(1 - (1 - confidence) / 2, 0, 1);
}
