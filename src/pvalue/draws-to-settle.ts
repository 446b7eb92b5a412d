// How many draws it would take before the interval of a sampled p no longer holds the level it is compared with.

/**
 * Draws for which a normal interval around `estimate` would just exclude `alpha`: z^2 p (1 - p) / (p - alpha)^2, rounded
 * up to two digits; undefined when the estimate is alpha itself. A guide, not a promise: the estimate will move.
 */
export async function drawsToSettle(estimate: number, alpha: number, confidence: number): Promise<number | undefined> {
  if (estimate === alpha) return undefined;
  const { jStat } = await import('jstat');
  const z = jStat.normal.inv(1 - (1 - confidence) / 2, 0, 1);
  const spread = Math.max(estimate * (1 - estimate), alpha * (1 - alpha));
  const needed = (z * z * spread) / (estimate - alpha) ** 2;
  const step = 10 ** Math.max(0, Math.floor(Math.log10(needed)) - 1);
  return Math.ceil(needed / step) * step;
}
