import { expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import type { PlanOptions } from '../../../src/plan/plan.js';
import { render } from '../../../src/report/formats.js';
import { checked } from '../../helpers/checked-result.js';

const bus = [
  [31, 22, 9, 14],
  [18, 34, 27, 12],
  [7, 19, 41, 22],
  [12, 15, 18, 33],
];

async function section(counts: number[][], options: PlanOptions = {}): Promise<string> {
  const result = checked(await analyse({ counts }, options));
  const text = render(result, 'text', { width: 90 });
  return /Which cells\?\n([\s\S]*?)\n\n/.exec(text)?.[1]?.replace(/\s+/g, ' ').trim() ?? '';
}

it('lists the cells that stand out, the furthest first, with what they rest on', async () => {
  const words = await section(bus, { method: 'sample', draws: 20_000, seed: 'bus' });
  expect(words).toMatch(
    /^\d cells of 16 have adjusted p of at most 0.05. cell count expected residual p adjusted p "row 1", "column 1" 31 15.5 \+5.03 1.9e-6/,
  );
  expect(words).toContain('from the same 20,000 random tables');
  expect(words).toContain('under complete independence');
});

it('says that no cell stands out', async () => {
  expect(
    await section([
      [3, 2, 2],
      [2, 3, 2],
      [2, 2, 3],
    ]),
  ).toMatch(/^No cell stands out: the smallest adjusted p is /);
});

it('says of a 2x2 table that its cells stand together', async () => {
  expect(
    await section([
      [8, 2],
      [1, 9],
    ]),
  ).toContain('All four cells lie equally far from expectation');
});

it('is left out where it is not wanted, and where one table only is possible', async () => {
  expect(await section(bus, { method: 'asymptotic', cells: false })).toBe('');
  expect(await section([[3, 4]])).toBe('');
});

it('says why p is not adjusted, and --cells draws tables for it where nothing else does', async () => {
  expect(await section(bus, { method: 'asymptotic' })).toContain(
    'Not adjusted over all cells: exact work is over the bound',
  );
  const result = checked(
    await analyse({ counts: bus }, { method: 'asymptotic', cells: true, effort: 1e6, seed: 'own' }),
  );
  expect(result.plan).toMatchObject({
    seed: null,
    cells: { adjustment: 'sample', draws: 100_000, seed: 'own', asked: true },
  });
  expect(render(result, 'text', { width: 200 })).toContain('cells, seed "own"');
  expect(result.methods).toContain('from 100,000 random tables, seed "own"');
});
