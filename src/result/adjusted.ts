// The type of an adjusted line (type only: nothing is loaded at run time).
export type { AdjustedLine } from '../family/declaration.js';
