// Sampling is proved: every sampler and every switch between samplers, a million draws each with fixed seeds, against laws
// listed in exact arithmetic. The whole family is held to Holm's procedure at 1e-6, and biased samplers fail it.
import { afterAll, describe, expect, it } from 'vitest';
import { planDraws, type DrawPlan, type Sampler } from '../../../src/null/sampled/draw-plan.js';
import { prepareSampler } from '../../../src/null/sampled/sample-cuts.js';
import { blockStream, type UniformSource } from '../../../src/random/stream.js';
import { cornerTable } from '../../helpers/margins.js';
import { liveFrom } from '../../helpers/tables.js';
import { countCases, fitOfCounts } from './proof/count-cases.js';
import { exactLaw } from './proof/exact-law.js';
import { fit, rejectedByHolm, type Verdict } from './proof/fit.js';
import { squares, fitOfSquare } from './proof/square-cases.js';
import { tableCases, type TableCase } from './proof/table-cases.js';

const draws = 1_000_000;
const familyLevel = 1e-6;
const verdicts: Verdict[] = [];

const samplersIn = ({ labelRows, cells }: DrawPlan): Sampler[] => [
  ...(labelRows > 0 ? (['labels'] as const) : []),
  ...cells.flat().map(({ sampler }) => sampler),
];

function fitOfTables({ rows, columns, forced }: TableCase, source: UniformSource): number {
  const { tables, probabilities } = exactLaw(rows, columns);
  const key = keyOver(rows, columns);
  const places = new Map(tables.map((table, k) => [key(table), k]));
  const observed = new Float64Array(tables.length);
  const sampler = prepareSampler(liveFrom(cornerTable(rows, columns)), [], forced);
  const table = new Float64Array(rows.length * columns.length);
  for (let draw = 0; draw < draws; draw++) {
    sampler.drawTable(source, table);
    const place = places.get(key(table));
    if (place === undefined) throw new Error(`drew a table that does not exist: ${table.join()}`);
    observed[place]!++;
  }
  return fit(probabilities, observed);
}

/** A number that tells tables with the same margins apart: their free cells as digits. */
function keyOver(rows: readonly number[], columns: readonly number[]): (table: ArrayLike<number>) => number {
  const free = rows.slice(0, -1).flatMap((_, i) => columns.slice(0, -1).map((__, j) => i * columns.length + j));
  const largest = Math.max(...rows.slice(0, -1)) + 1;
  return (table) => {
    let key = 0;
    for (const cell of free) key = key * largest + table[cell]!;
    return key;
  };
}

describe('drawn tables follow the exact law', () => {
  it.each(tableCases.map((tableCase) => [tableCase.claim, tableCase] as const))('%s', (claim, tableCase) => {
    const { rows, columns, forced, uses } = tableCase;
    expect(samplersIn(planDraws(liveFrom(cornerTable(rows, columns)), forced))).toEqual(
      expect.arrayContaining([...uses]),
    );
    const p = fitOfTables(tableCase, blockStream('goodness of fit', claim, 0));
    verdicts.push({ name: claim, p });
    expect(p).toBeGreaterThan(familyLevel / 1000);
  });
});

describe('drawn counts follow the exact law at any spread', () => {
  it.each(
    countCases.map(
      (one) => [`${one.sampler} of ${one.drawn} from ${one.total} with ${one.marked} marked`, one] as const,
    ),
  )('%s', (claim, one) => {
    fitOfCounts(one, blockStream('goodness of fit', claim, 0), draws).forEach((p, k) => {
      verdicts.push({ name: k === 0 ? claim : `${claim}, remainders`, p });
      expect(p).toBeGreaterThan(familyLevel / 1000);
    });
  });
});

describe('the inner cells of wide tables follow the exact law', () => {
  it.each(squares.map((square) => [square.claim, square] as const))('%s', (claim, square) => {
    const p = fitOfSquare(square, blockStream('goodness of fit', claim, 0), draws);
    verdicts.push({ name: claim, p });
    expect(p).toBeGreaterThan(familyLevel / 1000);
  });
});

describe('the family of all these tests', () => {
  it(`is not rejected by Holm's procedure at ${familyLevel}`, () => {
    expect(verdicts.length).toBeGreaterThan(50);
    expect(rejectedByHolm(verdicts, familyLevel)).toEqual([]);
  });

  it('is rejected when one word in a hundred is lost to zero', () => {
    const honest = blockStream('goodness of fit', 'biased', 0);
    const biased: UniformSource = {
      word: () => (honest.uniform() < 0.01 ? 0 : honest.word()),
      uniform: () => (honest.uniform() < 0.01 ? 0 : honest.uniform()),
    };
    const failing = tableCases.filter(({ claim }) => claim.endsWith('square'));
    expect(failing).toHaveLength(4);
    for (const tableCase of failing) {
      const p = fitOfTables(tableCase, biased);
      const rejected = rejectedByHolm([...verdicts, { name: tableCase.claim, p }], familyLevel);
      expect(rejected.map(({ name }) => name)).toEqual([tableCase.claim]);
    }
  });

  it('is rejected when units are drawn with putting back', () => {
    const { rows, columns } = tableCases[0]!;
    const { tables, probabilities } = exactLaw(rows, columns);
    const key = keyOver(rows, columns);
    const places = new Map(tables.map((table, k) => [key(table), k]));
    const observed = new Float64Array(tables.length);
    const source = blockStream('goodness of fit', 'putting back', 0);
    const total = rows.reduce((sum, row) => sum + row, 0);
    for (let draw = 0; draw < draws; draw++) {
      // Two rows filled from columns that stay as they are; tables that cannot be are drawn again.
      const table = new Array<number>(rows.length * columns.length).fill(0);
      for (const [i, units] of rows.slice(0, -1).entries()) {
        for (let unit = 0; unit < units; unit++) {
          const place = source.uniform() * total;
          table[i * columns.length + (place < columns[0]! ? 0 : place < columns[0]! + columns[1]! ? 1 : 2)]!++;
        }
      }
      const place = places.get(key(table));
      if (place !== undefined) observed[place]!++;
    }
    expect(rejectedByHolm([{ name: 'putting back', p: fit(probabilities, observed) }], familyLevel)).toHaveLength(1);
  });

  afterAll(() => {
    const least = [...verdicts].sort((a, b) => a.p - b.p).slice(0, 3);
    console.info(
      `goodness of fit: ${verdicts.length} tests, least p ${least.map(({ name, p }) => `${p.toPrecision(3)} (${name})`).join(', ')}`,
    );
  });
});
