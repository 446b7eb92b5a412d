// The input stage: text of any form -> the Table and how it was read.
export type { Delimiter, InputNote, MissingFacts, ReadTable, SourceFacts } from './read-table.js';
export type { InlineOptions } from './inline.js';
export { looksLikeRow, readInline } from './inline.js';
export type { CrossTableOptions } from './cross-table.js';
export { readCrossTable } from './cross-table.js';
export type { RecordOptions } from './records.js';
export { readRecords } from './records.js';
export type { YesNo } from './layout.js';
export type { TotalsRule } from './total-lines.js';
export type { MissingRule } from './record-tally.js';
export { delimiterText, detectDelimiter } from './delimiter.js';
export { isMissingText, parseCount } from './count-text.js';
export { parseLabelList } from './label-list.js';
export { changeLevels, planLevels, regroup, type LevelWishes } from './level-changes.js';
export { orderLevels } from './level-order.js';
