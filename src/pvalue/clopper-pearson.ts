// The interval of Clopper & Pearson (1934) for a probability estimated from a fixed number of draws.

/**
 * Limits whose coverage is at least `confidence` whatever the probability; hits of draws, 0 <= hits <= draws.
 * Beta quantiles from cephes (relative error about 2e-12), which is loaded on first use because it is large.
 */
export async function clopperPearson(hits: number, draws: number, confidence: number): Promise<[number, number]> {
  const risk = (1 - confidence) / 2;
  // At the ends the beta quantiles have closed forms.
  if (hits === 0) return [0, -Math.expm1(Math.log(risk) / draws)];
  if (hits === draws) return [Math.exp(Math.log(risk) / draws), 1];
  const { default: cephes } = await import('cephes');
  await cephes.compiled;
  return [cephes.incbi(hits, draws - hits + 1, risk), 1 - cephes.incbi(draws - hits, hits + 1, risk)];
}
