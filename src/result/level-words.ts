// What was done to the levels of a table before anything else, in sentences.
import { quoted } from './label-words.js';
import { countWords } from './number-words.js';
import type { InputEcho } from './result.js';

type Change = NonNullable<InputEcho['levels']>['changes'][number];

const listed = (labels: readonly string[]): string => labels.map(quoted).join(', ');

function changeWords({ action, side, into, labels }: Change): string {
  if (action === 'merge') return `${side} ${listed(labels)} were merged into ${quoted(into ?? '')}`;
  return action === 'keep'
    ? `of the ${side} only ${listed(labels)} were kept`
    : `${side} ${listed(labels)} were left out`;
}

/** One sentence for all changes, or none. */
export function levelSentences({ levels }: InputEcho): string[] {
  if (levels === undefined) return [];
  const left =
    levels.leftOut === 0 ? '' : ` (${countWords(levels.leftOut)} count${levels.leftOut === 1 ? '' : 's'} left out)`;
  return [`Before anything else, ${levels.changes.map(changeWords).join('; ')}${left}.`];
}
