import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';
import { csvColumns } from '../../src/report/csv.js';
import { render } from '../../src/report/formats.js';
import * as samples from '../helpers/sample-results.js';
import type { Result } from '../../src/result/result.js';

const rowsOf = (report: string): Record<string, string>[] =>
  parse(report, { columns: true }) as Record<string, string>[];

function withEvent(event: string): Result {
  const { waldExact } = samples;
  return { ...waldExact, statistic: { ...waldExact.statistic, event } };
}

describe('the csv report', () => {
  it('has the published columns, in this order', () => {
    expect(render(samples.waldExact, 'csv').split('\n')[0]).toBe(
      'headline,statistic,value,tail,rule,orderedBy,method,p,log10P,reason,strict,mid,tied,point,degreesOfFreedom,' +
        'guaranteed,relativeError,atLeast,atLeastUpper,atLeastLower,draws,estimate,standardError,intervalLower,' +
        'intervalUpper,intervalConfidence,stoppedBecause,risk,groups,event,first,second,rows,columns,total,seed,version,' +
        'fixed,nuisance,nuisanceSecond,maximumError,nullValue',
    );
    for (const column of csvColumns) expect(column.words).not.toBe('');
  });

  it('has one row for each p-value, the headline first, all digits kept', () => {
    const rows = rowsOf(render(samples.waldExact, 'csv'));
    expect(rows).toHaveLength(samples.waldExact.pValues.length);
    expect(rows.map((row) => row.headline)).toEqual(['true', 'false', 'false', 'false']);
    expect(rows[0]).toMatchObject({
      statistic: 'wald',
      value: '4.427188724235731',
      tail: 'both',
      rule: 'distance',
      p: '0.005477494641581329',
      mid: '0.002798285306025244',
      relativeError: '2.2e-14',
      draws: '',
      event: 'healed',
      first: 'treated',
      second: 'control',
    });
  });

  it('leaves the value empty beside a p of another statistic', () => {
    expect(rowsOf(render(samples.probabilityExact, 'csv')).at(-1)).toMatchObject({ statistic: 'pearson', value: '' });
  });

  it('carries the draws and the error of a sampled p, both tails of a doubled one', () => {
    expect(rowsOf(render(samples.doubledSampled, 'csv'))[0]).toMatchObject({
      atLeast: '203',
      atLeastUpper: '203',
      atLeastLower: '4973',
      draws: '5000',
      standardError: '0.005582231811739817',
      seed: '42',
    });
  });

  it('leaves p empty beside its reason and logarithm when it is below the smallest double', () => {
    expect(rowsOf(render(samples.underflow, 'csv'))[0]).toMatchObject({ p: '', reason: 'underflow', strict: '0' });
  });

  it.each(['=1+1', '+1', '-1', '@x', '\tx', '\rx', '＝1'])('puts an apostrophe before the text cell %j', (event) => {
    expect(rowsOf(render(withEvent(event), 'csv'))[0]!.event).toMatch(/^'/);
    expect(rowsOf(render(withEvent(event), 'csv', { rawCsv: true }))[0]!.event).toBe(event);
  });

  it('puts none before a number, even a negative or an infinite one', () => {
    const { waldExact } = samples;
    const infinite: Result = { ...waldExact, statistic: { ...waldExact.statistic, value: '-infinity' } };
    expect(rowsOf(render(infinite, 'csv'))[0]).toMatchObject({
      value: '-infinity',
      log10P: expect.stringMatching(/^-2\.26/),
    });
    expect(rowsOf(render({ ...waldExact, statistic: { ...waldExact.statistic, value: -4.4 } }, 'csv'))[0]!.value).toBe(
      '-4.4',
    );
  });

  it('quotes commas and quotation marks, and keeps each p on one line', () => {
    const report = render(withEvent('a "b", c\nd'), 'csv');
    expect(rowsOf(report)[0]!.event).toBe('a "b", c\\nd');
    expect(report.split('\n')).toHaveLength(samples.waldExact.pValues.length + 2);
  });
});
