// What the steps of the network take, in the counted units of forecast.ts (30 ns): the forecast foresees these steps and the
// meter counts them, with the same prices. Fitted to the times of the tables of test/bench/forecast.bench.ts.

/** The first steps of a program that is not warm yet: some 40 ms. */
export const networkStart = 1.3e6;
/** Bounds on one cell of the columns at either side of a node. */
export const perBoundedCell = 1;
/** One way to set a column at a node. */
export const perTransition = 1.2;
/** One partial sum gathered, sorted and merged. */
export const perEntry = 0.7;
/** One partial sum of the first half looked up in the second half's list. */
export const perLookup = 0.2;
/** Two partial sums within rounding of the observed value, traced back and decided in whole numbers. */
export const perNearTie = 3000;
/** One partial sum added to a cell of a grid. */
export const perGridEntry = 0.2;
