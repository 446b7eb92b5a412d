// Remarks of a batch on standard error.
import { countWords } from '../../../result/number-words.js';
import type { Unfinished } from './sink.js';

const tablesWords = (tables: number): string => `${countWords(tables)} table${tables === 1 ? '' : 's'}`;

export const faultWords = (faults: number, tables: number): string =>
  `note: ${countWords(faults)} of ${tablesWords(tables)} could not be used; ${faults === 1 ? 'its line says' : 'their lines say'} why\n`;

export const resumeWords = (unfinished: Unfinished | undefined): string =>
  unfinished === undefined
    ? 'note: nothing was begun, so there is nothing to go on with; the run starts\n'
    : `note: ${tablesWords(unfinished.reached.tables)} were finished before; the run goes on from there\n`;
