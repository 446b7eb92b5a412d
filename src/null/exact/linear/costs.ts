// What the steps of the law of a linear statistic take, in units of 30 ns: the forecast foresees these steps, the meter counts
// them, with the same prices.

/** The first steps of a program that is not warm yet: some 10 ms. */
export const linearStart = 3e5;
/** A value added to an array, to a hash map. */
export const perDenseValue = 0.06;
export const perSparseValue = 3;
/** A move from node to node. */
export const perMove = 7;
