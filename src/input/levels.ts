// Levels of one column of raw records, in their order of appearance. Memory depends on the number of levels, never on
// the number of records: one entry a level, and a bounded memo of the spellings met.
import { isMissingText } from './count-text.js';

/** The level that missing values make under `--missing level`. */
export const missingLevel = '(missing)';

/** More levels than this on a side are no categories: an identifier or a measurement was named. */
export const mostLevels = 1000;

/** Spellings of one level differ by blanks; past this many they are worked out anew each time. */
const mostSpellings = 4 * mostLevels;

/** What `find` answers for a text that is no level yet. */
export const missing = -1;
export const fresh = -2;

export class Levels {
  readonly labels: string[] = [];
  private readonly indexes = new Map<string, number>();
  /** Text as read -> index or `missing`, so that a record costs one look-up a side. */
  private readonly spellings = new Map<string, number>();
  private indexOfMissing = missing;

  /** Index from 0 of the level a text stands for, or `missing`, or `fresh`. */
  find(text: string): number {
    return this.spellings.get(text) ?? this.learn(text);
  }

  /** Adds the level a fresh text stands for. */
  add(text: string): number {
    const index = this.labels.push(text.trim()) - 1;
    this.indexes.set(this.labels[index]!, index);
    return index;
  }

  /** Index of the level of missing values, added when first asked for. Kept apart from a real level of its name. */
  addMissing(): number {
    if (this.indexOfMissing < 0) this.indexOfMissing = this.labels.push(missingLevel) - 1;
    return this.indexOfMissing;
  }

  private learn(text: string): number {
    const index = isMissingText(text) ? missing : (this.indexes.get(text.trim()) ?? fresh);
    if (index !== fresh && this.spellings.size < mostSpellings) this.spellings.set(text, index);
    return index;
  }
}
