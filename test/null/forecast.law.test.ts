// The forecast of exact work against the work done, both in counted units: no clock, the same on every machine.
import { expect, test } from 'vitest';
import { exactCuts } from '../../src/null/exact/exact-cuts.js';
import { Meter } from '../../src/null/exact/meter.js';
import { linearStart } from '../../src/null/exact/linear/costs.js';
import { networkStart } from '../../src/null/exact/network/costs.js';
import { forecastExact } from '../../src/null/forecast.js';
import { orderingFor } from '../../src/null/ordering.js';
import { statisticNamed } from '../../src/statistic/registry.js';
import { liveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';
import { forecastTables } from '../helpers/forecast-tables.js';

const mostUnits = 8e6;
const roles = { groups: 'rows', event: 0, first: 0 } as const;

interface Case {
  readonly name: string;
  readonly foreseen: number;
  readonly spent: number;
  readonly start: number;
}

const cases: Case[] = [];
for (const { name, counts } of forecastTables) {
  for (const statistic of ['pearson', 'probability', 'trend']) {
    const live = liveTable(makeTable({ counts }));
    const bound = statisticNamed(statistic).bind(live, roles);
    const { engine, workUnits } = forecastExact(live, bound, statistic);
    if (workUnits > mostUnits) continue;
    const meter = new Meter();
    await exactCuts(live, [orderingFor(live, bound, 'upper')], engine, statistic, meter);
    const start = engine === 'network' ? networkStart : engine === 'linear' ? linearStart : 0;
    cases.push({ name: `${statistic}, ${name}`, foreseen: workUnits, spent: meter.spent, start });
  }
}

const shareWithin = (ratios: readonly number[], factor: number): number =>
  ratios.filter((ratio) => ratio <= factor && ratio >= 1 / factor).length / ratios.length;

test('work is foreseen within a factor of 5 for nine tables in ten', () => {
  const ratios = cases.map(({ foreseen, spent }) => foreseen / spent);
  expect(ratios.length).toBeGreaterThan(130);
  expect(shareWithin(ratios, 5)).toBeGreaterThanOrEqual(0.9);
});

test('so it is without the start that both count, for three tables in four; and never tenfold too low', () => {
  const ratios = cases
    .filter(({ spent, start }) => spent > start)
    .map(({ foreseen, spent, start }) => (foreseen - start) / (spent - start));
  expect(shareWithin(ratios, 5)).toBeGreaterThanOrEqual(0.75);
  expect(Math.min(...ratios)).toBeGreaterThan(0.1);
});
