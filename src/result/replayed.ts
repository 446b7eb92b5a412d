// The type of what a replay finds (type only: nothing is loaded at run time).
export type { ReplayReport } from '../record/declaration.js';
