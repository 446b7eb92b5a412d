// The least p that the margins of a 2x2 table allow, for results that do not say it: the p of its two most extreme tables.
import { answer } from './analyse.js';
import type { PlanOptions } from './plan/plan.js';

/**
 * @param wishes those of the result, as its line or record holds them.
 * @returns null where it is not known: not a 2x2 table, or a p that is not exact given both margins.
 */
export async function reachOf(counts: readonly (readonly number[])[], wishes: PlanOptions): Promise<number | null> {
  if (counts.length !== 2 || counts.some((row) => row.length !== 2)) return null;
  const [[a, b], [c, d]] = counts as [[number, number], [number, number]];
  const down = Math.min(a, d);
  const up = Math.min(b, c);
  const ends = [
    [[a - down, b + down], [c + down, d - down]], // prettier-ignore
    [[a + up, b - up], [c - up, d + up]], // prettier-ignore
  ];
  let least = 1;
  for (const end of ends) {
    const { pValues } = await answer({ counts: end }, { ...wishes, method: 'exact' }).catch(() => ({ pValues: [] }));
    const [headline] = pValues;
    if (headline?.method !== 'exact') return null;
    least = Math.min(least, headline.p ?? 0);
  }
  return least;
}
