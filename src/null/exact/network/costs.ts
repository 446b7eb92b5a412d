// What the steps of the network take, in the counted units of forecast.ts (30 ns): the forecast foresees these steps and the
// meter counts them, with the same prices.

/** Bounds on one cell of the columns at either side of a node. */
export const perBoundedCell = 0.3;
/** One way to set a column at a node. */
export const perTransition = 0.3;
/** One partial sum gathered, sorted and merged. */
export const perEntry = 0.8;
/** One partial sum of the first half looked up in the second half's list. */
export const perLookup = 0.2;
/** Two partial sums within rounding of the observed value, traced back and decided in whole numbers. */
export const perNearTie = 3000;
/** One partial sum added to a cell of a grid. */
export const perGridEntry = 0.2;
