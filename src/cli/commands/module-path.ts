// Tells a module of the user's own from the name of a statistic; what loads it is loaded only then.
import type { PlanOptions } from '../../plan/plan.js';

/** `./mine.mjs`, `stats/mine.js`: what has an ending of a module, or a slash. */
export const isModulePath = (text: string): boolean => /[/\\]|\.[cm]?js$/.test(text);

/** Wishes with the statistic loaded, where it is named by a path; else as they are. */
export async function withOwnStatistic(wishes: PlanOptions): Promise<PlanOptions> {
  const { statistic } = wishes;
  if (typeof statistic !== 'string' || !isModulePath(statistic)) return wishes;
  return { ...wishes, ...(await (await import('./load-statistic.js')).loadStatistic(statistic)) };
}
