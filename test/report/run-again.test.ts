import { describe, expect, it } from 'vitest';
import { againCommand, againInWords } from '../../src/report/run-again.js';
import { render } from '../../src/report/formats.js';
import * as samples from '../helpers/sample-results.js';
import type { Result } from '../../src/result/result.js';

const withLabels = (rowLabels: string[], columnLabels: string[]): Result => ({
  ...samples.waldExact,
  input: { ...samples.waldExact.input, rowLabels, columnLabels },
});
const commandOf = (result: Result): string | undefined => againCommand(result)?.join(' ');

describe('the command to run it again', () => {
  it('types the rows with their labels and names the whole plan', () => {
    expect(commandOf(samples.waldExact)).toBe(
      'keepsum test treated=8,2 control=1,9 --column-labels healed,open --statistic wald --tail both ' +
        '--two-sided-rule distance --groups rows --event healed --reference control --method exact',
    );
  });

  it('leaves out the labels that untitled rows and columns have anyway', () => {
    expect(commandOf(withLabels(['row 1', 'row 2'], ['column 1', 'column 2']))).toMatch(
      /^keepsum test 8,2 1,9 --statistic/,
    );
  });

  it('names draws, seed and level of a sampled one, and the columns of records', () => {
    expect(commandOf(samples.pearsonSampled)).toBe(
      'keepsum test FILE --rows ward --columns outcome --missing drop --statistic pearson --tail upper --method sample ' +
        '--draws 1000 --seed spring-7 --sampling-confidence 0.99',
    );
  });

  it('drops totals again where totals were dropped', () => {
    expect(commandOf(samples.emptyRow)).toContain('keepsum test FILE --drop-totals --statistic pearson');
  });

  it('keeps totals again where totals were kept', () => {
    const notes = [{ code: 'totals-kept', text: 'row "Total" was counted as data, as asked' }];
    expect(commandOf({ ...samples.wideTable, notes })).toContain('keepsum test FILE --keep-totals --statistic');
  });

  it('quotes what a shell would act on', () => {
    expect(commandOf(withLabels(['a b', '$(rm x)'], ['one, two', 'x;y']))).toMatch(
      /^keepsum test 'a b=8,2' '\$\(rm x\)=1,9' --column-labels '"one, two",x;y' /,
    );
    expect(commandOf(withLabels(['=ls', '@x'], ['~', '*']))).toMatch(
      /^keepsum test '=ls=8,2' '@x=1,9' --column-labels '~,\*' /,
    );
  });

  it.each(["it's", 'a\u001b[2J', '-1', 'curly \u2019'])(
    'is not given where the label %j cannot be typed safely',
    (label) => {
      expect(againCommand(withLabels([label, 'b'], ['x', 'y']))).toBeUndefined();
    },
  );

  it('joins a value that looks like an option with an equals sign', () => {
    const { pearsonSampled } = samples;
    expect(commandOf({ ...pearsonSampled, plan: { ...pearsonSampled.plan, seed: '-7' } })).toContain('--seed=-7');
    expect(commandOf({ ...pearsonSampled, plan: { ...pearsonSampled.plan, seed: '--help' } })).toContain(
      '--seed=--help',
    );
  });

  it('is none for counts that a program passed in; the plan then stands in words', () => {
    const result: Result = { ...samples.waldExact, input: { ...samples.waldExact.input, source: { form: 'library' } } };
    expect(againCommand(result)).toBeUndefined();
    expect(render(result, 'text').replace(/\s+/g, ' ')).toContain(
      'Take the same counts with statistic wald, tail both, two-sided rule distance, groups rows, event "healed", ' +
        'reference "control", method exact.',
    );
  });

  it('gives way to the words where a part is wider than the page', () => {
    const { pearsonSampled } = samples;
    const result = { ...pearsonSampled, plan: { ...pearsonSampled.plan, seed: 'x'.repeat(60) } };
    expect(render(result, 'text', { width: 40 })).not.toContain('keepsum test');
    expect(againInWords(result)).toContain('(rows "ward", columns "outcome")');
    expect(render(result, 'text', { width: 96 })).toContain('keepsum test FILE');
  });
});
