// Forecasts err: work that was foreseen to be small and is not is ended at three times the bound, and what then happens is
// said. The forecast is made to say 1 here, so that the bound alone decides.
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { exactCuts } from '../src/null/exact/exact-cuts.js';
import { Meter } from '../src/null/exact/meter.js';
import type * as Source from '../src/answer.js';
import type * as Forecasts from '../src/null/forecast.js';
import { forecastExact } from '../src/null/forecast.js';
import type { Problem } from '../src/problem/problem.js';
import { boundTo, liveFrom, orderingOf } from './helpers/tables.js';

let answer: typeof Source.answer;

beforeAll(async () => {
  vi.resetModules();
  vi.doMock('../src/null/forecast.js', async (original) => {
    const real = await original<typeof Forecasts>();
    const forecast: typeof real.forecastExact = (...of) => ({ ...real.forecastExact(...of), workUnits: 1 });
    return { ...real, forecastExact: forecast };
  });
  ({ answer } = await import('../src/answer.js'));
});

afterAll(() => {
  vi.doUnmock('../src/null/forecast.js');
  vi.resetModules();
});

const cases: [statistic: string, counts: number[][]][] = [
  ['pearson', [[9, 4, 7, 2], [3, 8, 5, 6], [6, 1, 9, 9]]],
  ['probability', [[12, 4, 7, 2, 9], [3, 8, 15, 6, 4]]],
  ['trend', [[19, 14, 27, 12, 9], [13, 28, 15, 26, 18]]],
  ['max-residual', [[9, 4, 7, 2], [3, 8, 5, 6], [6, 1, 9, 9]]],
]; // prettier-ignore

/** Units that the engine really spends. */
async function spentOn(statistic: string, counts: number[][]): Promise<number> {
  const live = liveFrom(counts);
  const meter = new Meter();
  const { engine } = forecastExact(live, boundTo(live, statistic), statistic);
  const names = statistic === 'trend' ? (['distance', 'upper', 'lower'] as const) : (['upper'] as const);
  const orderings = names.map((name) => orderingOf(live, statistic, name));
  await exactCuts(live, orderings, engine, statistic, meter);
  return meter.spent;
}

describe.each(cases)('exact work on %s that goes past its forecast', (statistic, counts) => {
  let third: number;
  beforeAll(async () => {
    third = (await spentOn(statistic, counts)) / 3;
  });

  it('is finished where it stays below three times the bound', async () => {
    const { prepared } = await answer({ counts }, { statistic, method: 'exact', effort: Math.ceil(third) });
    expect(prepared.plan).toMatchObject({ method: 'exact', forecast: { workUnits: 1 } });
  });

  it('is ended beyond, and auto draws and says why', async () => {
    const wishes = { statistic, effort: Math.floor(third) - 1, draws: 1000, seed: 'past' };
    const { prepared, pValues } = await answer({ counts }, wishes);
    expect(prepared.plan).toMatchObject({ method: 'sample', methodAsked: 'auto' });
    expect(prepared.plan.methodReason).toMatch(/^exact work outgrew its forecast: .*; ended after [\d,.e]+ units$/);
    expect(pValues[0]!.method).toBe('sample');
  });

  it('is ended beyond, and exact ends with status 3 and a bound to try', async () => {
    const wishes = { statistic, method: 'exact', effort: Math.floor(third) - 1 } as const;
    const refused = await answer({ counts }, wishes).catch((thrown: unknown) => thrown as Problem);
    expect(refused).toMatchObject({ code: 'exact-over-bound', exitStatus: 3 });
    expect((refused as Problem).hint).toMatch(/--effort \d/);
  });
});
