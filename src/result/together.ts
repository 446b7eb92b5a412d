// The type of a result of several outcomes tested together (type only: nothing is loaded at run time).
export type { TogetherResult } from '../family/together-declaration.js';
