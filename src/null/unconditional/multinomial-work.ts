// Forecast of the work that `multinomialP` takes.

/** Halvings that designs of a few dozen units take; flat ones take several times as many. */
const usualHalvings = 250;

/** Counted work in units of about 30 ns. */
export const multinomialWork = (total: number): number =>
  Math.round((total + 1) ** 3 / 3 + (usualHalvings * (total + 1) * total ** 2) / 60 + 1000);
