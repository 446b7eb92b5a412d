// The types of the one reported shape, derived from its declaration (types only: nothing is loaded at run time).
import type { z } from 'zod';
import type { resultDeclaration } from './declaration.js';

export type Result = z.infer<typeof resultDeclaration>;
export type PValue = Result['pValues'][number];
export type PValueError = PValue['errors'][number];
export type InputEcho = Result['input'];
export type InputSource = InputEcho['source'];
export type MissingRecords = NonNullable<InputEcho['missing']>;
export type Diagnostics = Result['diagnostics'];
export type Effect = NonNullable<Result['effects']>[number];
export type EffectInterval = Effect['intervals'][number];
export type NullSummary = NonNullable<Result['nullSummary']>;
export type Fragility = NonNullable<Result['fragility']>;
export type Note = Result['notes'][number];
