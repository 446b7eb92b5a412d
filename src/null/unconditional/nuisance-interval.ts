// An interval that holds the common proportion with probability at least 1 - gamma (Clopper & Pearson 1934): the nuisance
// is looked for in it alone, and gamma is added to p (Berger & Boos 1994).

/** For t events in n units; both ends are put outward by 1e-9 of themselves, far more than rounding can do. */
export function nuisanceInterval(events: number, total: number, gamma: number): [number, number] {
  return [lowerEnd(events, total, gamma / 2), 1 - lowerEnd(total - events, total, gamma / 2)];
}

/** Where P(X >= events) = tail, by bisection; a little below it. */
function lowerEnd(events: number, total: number, tail: number): number {
  if (events === 0) return 0;
  let low = 0;
  let high = 1;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (upperTail(events, total, middle) <= tail * (1 - 1e-10)) low = middle;
    else high = middle;
  }
  return low * (1 - 1e-9);
}

/** P(X >= events), X binomial; each term from the mode outward. */
function upperTail(events: number, total: number, share: number): number {
  const mode = Math.min(total, Math.floor((total + 1) * share));
  const odds = share / (1 - share);
  let inside = 0;
  let whole = 0;
  let weight = 1;
  for (let x = mode; x <= total && weight > 0; x++) {
    whole += weight;
    if (x >= events) inside += weight;
    weight *= ((total - x) / (x + 1)) * odds;
  }
  weight = mode / (total - mode + 1) / odds;
  for (let x = mode - 1; x >= 0 && weight > 0; x--) {
    whole += weight;
    if (x >= events) inside += weight;
    weight *= x / (total - x + 1) / odds;
  }
  return inside / whole;
}
