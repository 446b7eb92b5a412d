// Why something about a cell is missing.
export const cellReasons = ['underflow', 'over-bound', 'empty-line', 'only-one-table'] as const;
export type CellReason = (typeof cellReasons)[number];
