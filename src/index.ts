// The library: what a program may use, grouped by the stages of the flow.
import type { PictureName } from './report/pictures/names.js';
import type { Result } from './result/result.js';

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

// Result -> pictures, and the report that holds them; loaded when first called
/** One picture as an SVG document; `null` needs a result made with the option `nullSummary`. */
export const drawPicture = async (result: Result, name: PictureName): Promise<string> =>
  (await import('./report/pictures/pictures.js')).drawPicture(result, name);
/** One or more results as one HTML file. */
export const htmlReport = async (results: readonly Result[]): Promise<string> =>
  (await import('./report/html/report.js')).htmlReport(results);
export type { PictureName } from './report/pictures/names.js';

// what goes wrong
export { Problem } from './problem/problem.js';
