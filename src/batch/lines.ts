// The types of a batch's lines (types only: nothing is loaded at run time).
import type { z } from 'zod';
import type { Result } from '../result/result.js';
import type { compactDeclaration, errorDeclaration, lineDeclaration } from './declaration.js';

/** A table to be tested, as one line of input. */
export type BatchLine = z.infer<typeof lineDeclaration>;
export type CompactLine = z.infer<typeof compactDeclaration>;
export type ErrorLine = z.infer<typeof errorDeclaration>;
/** A whole result with the key of its table. */
export type FullLine = Result & { readonly key: string; readonly family?: string };
