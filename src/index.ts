// The library: what a program may use, grouped by the stages of the flow.

// input -> Table
export { makeTable, type Table, type TableParts } from './table/table.js';
export { changeLevels, readCrossTable, readInline, readRecords } from './input/index.js';
export type { ReadTable } from './input/read-table.js';

// plan
export { methods, tails, twoSidedRules, type Plan, type PlanOptions } from './plan/plan.js';
export { statisticNames, statistics } from './statistic/registry.js';
export type { Statistic } from './statistic/contract.js';
export type { Margins, OwnStatistic } from './statistic/own.js';

// Table + plan -> Result
export { analyse } from './analyse.js';
export type { PValue, Result } from './result/result.js';
export { resultJsonSchema } from './result/schema.js';

// a planned study -> its power
export { planPower, type PowerWishes } from './plan-power.js';
export { powerJsonSchema, type PowerResult } from './result/power-declaration.js';

// many tables
export { analyseMany, type ManyOptions } from './batch/analyse-many.js';
export type { BatchLine, CompactLine, ErrorLine, FullLine } from './batch/lines.js';
export { batchLineJsonSchema, compactLineJsonSchema, errorLineJsonSchema } from './batch/schemas.js';

// random tables with given margins
export { drawTables, type DrawOptions } from './draw-tables.js';

// Result -> report
export { render } from './report/formats.js';

// what goes wrong
export { Problem } from './problem/problem.js';
