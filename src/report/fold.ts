// Folds sentences into lines of a given width, at spaces where there are any.
import { breakAt, displayWidth } from './display-width.js';

export interface Indent {
  /** Spaces before the first line, and before those that follow it. */
  readonly first: number;
  readonly rest: number;
}

/** Lines of at most `width` columns; a word that is wider than a whole line is broken. Ends without trailing spaces. */
export function fold(text: string, width: number, indent: Indent = { first: 0, rest: 0 }): string[] {
  const lines: string[] = [];
  let line = ' '.repeat(indent.first);
  let used = indent.first;
  let isEmpty = true;
  const startLine = (): void => {
    lines.push(line.trimEnd());
    line = ' '.repeat(indent.rest);
    used = indent.rest;
    isEmpty = true;
  };
  for (const word of text.split(' ')) {
    for (const piece of breakAt(word, width - Math.max(indent.first, indent.rest))) {
      const wide = displayWidth(piece);
      if (!isEmpty && used + 1 + wide > width) startLine();
      line += isEmpty ? piece : ` ${piece}`;
      used += wide + (isEmpty ? 0 : 1);
      isEmpty = false;
    }
  }
  startLine();
  return lines;
}
