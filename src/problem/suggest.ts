// "Did you mean": the closest of the allowed names, or nothing when none is close. Suggested, never auto-corrected.

/** Edits (insert, delete, replace, swap neighbours) that turn one word into the other (Damerau 1964, restricted form). */
export function editDistance(from: string, to: string): number {
  const rows = from.length + 1;
  const columns = to.length + 1;
  const cost = Array.from({ length: rows }, (_, i) => {
    const row = new Array<number>(columns).fill(0);
    row[0] = i;
    return row;
  });
  for (let j = 0; j < columns; j++) cost[0]![j] = j;
  for (let i = 1; i < rows; i++) {
    for (let j = 1; j < columns; j++) {
      const change = from[i - 1] === to[j - 1] ? 0 : 1;
      let best = Math.min(cost[i - 1]![j]! + 1, cost[i]![j - 1]! + 1, cost[i - 1]![j - 1]! + change);
      if (i > 1 && j > 1 && from[i - 1] === to[j - 2] && from[i - 2] === to[j - 1]) {
        best = Math.min(best, cost[i - 2]![j - 2]! + 1);
      }
      cost[i]![j] = best;
    }
  }
  return cost[rows - 1]![columns - 1]!;
}

/** The allowed name nearest to what was typed (case ignored), if at most a third of its letters differ; else undefined. */
export function nearest(typed: string, allowed: readonly string[]): string | undefined {
  let best: string | undefined;
  let bestDistance = Infinity;
  for (const name of allowed) {
    const wanted = name.toLowerCase();
    const given = typed.toLowerCase();
    // What was only begun is nearer the less is missing: --row is --rows before --row-labels.
    const isBegun = wanted.startsWith(given) && given.length >= 3;
    const distance = isBegun ? 1 - 1 / (1 + wanted.length - given.length) : editDistance(given, wanted);
    if (distance < bestDistance && distance <= Math.max(1, Math.ceil(name.length / 3))) {
      best = name;
      bestDistance = distance;
    }
  }
  return best;
}

const mostListed = 12;

/** A hint sentence: the suggestion when there is one, and the list; of a long one, where nothing is near, its beginning. */
export function nameHint(typed: string, allowed: readonly string[]): string {
  const close = nearest(typed, allowed);
  const rest = allowed.length - mostListed;
  const list =
    rest <= 0
      ? `allowed: ${allowed.join(', ')}`
      : close === undefined
        ? `allowed: ${allowed.slice(0, mostListed).join(', ')} and ${rest} more`
        : '';
  return [close === undefined ? '' : `did you mean ${close}?`, list].filter((part) => part !== '').join(' ');
}
