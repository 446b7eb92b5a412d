// Sizes that are promised: draws to a block, and the memory of look-up tables, together below 4 MB whatever the total.
// All but the first are look-up tables of one sampler (the logarithms are shared by all samplers of a process).

/** Draws to a block: the unit that streams, threads and shards are counted in. */
export const blockSize = 1000;

/** ln k! for k below this; larger arguments take the saddle-point form. 512 KiB. */
export const logFactorialEntries = 65_536;

/** Totals that those logarithms do not reach are drawn with other arithmetic. */
export const isWide = (total: number): boolean => total >= logFactorialEntries;

/** Up to this total a table's units may be laid out one by one, a byte each. */
export const bagUnits = 256;

/** Outcomes of laws that depend on one number, two bytes for each share of the unit interval. 512 KiB. */
export const guideEntries = 262_144;

/** Borders between those outcomes, eight bytes each. 768 KiB. */
export const guideBorders = 98_304;

/** Chances of keeping a proposal, eight bytes each. 512 KiB. */
export const trialChances = 65_536;

/** Values of the statistic by cell and count, eight bytes each. 512 KiB. */
export const cellValueEntries = 65_536;

/** Counts of near-tied tables whose place was decided exactly, eight bytes each. 256 KiB. */
export const decidedEntries = 32_768;

/** Places of 2x2 tables by their corner count, one byte each. 64 KiB. */
export const cornerEntries = 65_536;
