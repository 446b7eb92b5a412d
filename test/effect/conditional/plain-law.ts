// The law of one count given all margins and an odds ratio, listed in full: for small tables, with nothing shared with src.
export type Rule = 'probability' | 'blaker';

const choose = (n: number, k: number): number => {
  let ways = 1;
  for (let i = 1; i <= k; i++) ways = (ways * (n - k + i)) / i;
  return ways;
};

/** Probabilities of the first cell, from its lowest count up, at ln(odds ratio) = x. */
export function lawAt([[a, b], [c, d]]: number[][], x: number): number[] {
  const [first, second, events] = [a! + b!, c! + d!, a! + c!];
  const lowest = Math.max(0, events - second);
  const highest = Math.min(first, events);
  const centre = x > 0 ? highest : lowest;
  const weights = Array.from(
    { length: highest - lowest + 1 },
    (_, k) => choose(first, lowest + k) * choose(second, events - lowest - k) * Math.exp(x * (lowest + k - centre)),
  );
  const whole = weights.reduce((sum, weight) => sum + weight, 0);
  return weights.map((weight) => weight / whole);
}

/** Two-sided p by definition: all counts whose probability, or smaller tail, is no larger than that of the observed one. */
export function pAt(counts: number[][], rule: Rule, x: number): number {
  const law = lawAt(counts, x);
  const [[a], [c, d]] = counts as [number[], number[]];
  const observed = a! - Math.max(0, a! + c! - (c! + d!));
  const sum = (from: number, to: number): number => law.slice(from, to).reduce((all, p) => all + p, 0);
  const size = (k: number): number => (rule === 'probability' ? law[k]! : Math.min(sum(0, k + 1), sum(k, law.length)));
  const limit = size(observed) * (1 + 1e-13);
  return law.reduce((all, p, k) => (k === observed || size(k) <= limit ? all + p : all), 0);
}
