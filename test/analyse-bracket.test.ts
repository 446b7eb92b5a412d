// Where exact work is over its bound: a certified bracket if it tells more than draws, and draws that say why if not.
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { Problem } from '../src/problem/problem.js';
import { render } from '../src/report/formats.js';
import { checked } from './helpers/checked-result.js';

const counts = [
  [30, 24, 18, 33, 21, 27, 20, 26, 31, 28],
  [22, 29, 26, 19, 30, 24, 28, 23, 17, 21],
];

describe('a bracket', () => {
  it('stands where exact work is over its bound: p is its upper limit, and the exact p lies in it', async () => {
    const exact = checked(await analyse({ counts }, { method: 'exact', effort: 1e9 }));
    const result = checked(await analyse({ counts }, { effort: 2.5e6 }));
    const [p] = result.pValues;
    expect(result.plan).toMatchObject({ method: 'exact', methodAsked: 'auto', forecast: { engine: 'bracket' } });
    expect(result.plan.methodReason).toMatch(/the bound is 2,500,000; partial sums were merged/);
    const [error] = p!.errors;
    if (error?.kind !== 'bracket') throw new Error('no bracket');
    expect(p).toMatchObject({ p: error.upper, method: 'exact', guaranteed: true });
    expect(error.lower).toBeLessThanOrEqual(exact.pValues[0]!.p!);
    expect(error.upper).toBeGreaterThanOrEqual(exact.pValues[0]!.p!);
    expect(error.upper - error.lower).toBeLessThan(0.01);
    for (const part of ['strict', 'mid'] as const) {
      expect(Math.abs(p![part]! - exact.pValues[0]![part]!)).toBeLessThan(error.upper - error.lower);
    }
    expect(result.sentence).toMatch(/\(certified bracket 0\.\d+ to 0\.\d+\), exact up to that bracket/);
    expect(result.methods).toMatch(/upper limit of a certified bracket/);
    expect(render(result, 'text')).toMatch(/for certain/);
    expect(render(result, 'csv').split('\n')[1]).toContain(`,${error.lower},${error.upper},1,`);
    // The command that the report gives repeats it to the last digit.
    const again = await analyse({ counts }, { method: 'exact', effort: 2.5e6 });
    expect(again.pValues[0]).toEqual(p);
  });

  it('is left where draws would tell more: auto draws and says so, exact ends with the forecast and a hint', async () => {
    const dense = {
      counts: [
        [900, 700, 800, 650, 720],
        [850, 760, 810, 700, 690],
        [640, 590, 610, 730, 800],
        [720, 710, 660, 680, 640],
      ],
    };
    const result = checked(await analyse(dense, { effort: 1e6, draws: 1000, seed: 'x' }));
    expect(result.plan).toMatchObject({ method: 'sample', methodAsked: 'auto' });
    expect(result.plan.methodReason).toMatch(/^exact is out of reach: .*the bound is 1,000,000/);
    const refused = await analyse(dense, { effort: 1e6, method: 'exact' }).catch(
      (thrown: unknown) => thrown as Problem,
    );
    expect(refused).toMatchObject({ exitStatus: 3, code: 'exact-over-bound' });
  });
});
