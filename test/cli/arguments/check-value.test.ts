import { describe, expect, it } from 'vitest';
import { anyText, betweenZeroAndOne, oneOf, wholeNumber } from '../../../src/cli/arguments/check-value.js';
import { problemOf } from '../problem-of.js';

const draws = wholeNumber(1, 1e12, '100000');
const alpha = betweenZeroAndOne('0.05');

describe('whole numbers', () => {
  it.each([
    ['1', 1],
    ['100000', 100000],
    ['1e6', 1e6],
    ['2.5e+6', 2.5e6],
    ['1000000000000', 1e12],
  ])('reads %s', (text, value) => {
    expect(draws(text, '--draws')).toBe(value);
  });

  it.each([
    '0',
    '1.5',
    '1.0',
    '1.55e1',
    '-1',
    '1e13',
    '1,000',
    '0x10',
    ' 5',
    '5 ',
    'abc',
    '',
    '1e-1',
    'Infinity',
    'NaN',
    '१',
  ])('refuses %j and names the option and what it takes', async (text) => {
    const problem = await problemOf(() => draws(text, '--draws'));
    expect(problem).toMatchObject({
      kind: 'usage',
      place: '--draws',
      message: `"${text}" is not a whole number from 1 to 1e12`,
      hint: 'write --draws 100000',
    });
  });
});

describe('numbers between 0 and 1', () => {
  it.each([
    ['0.05', 0.05],
    ['.05', 0.05],
    ['1e-3', 0.001],
    ['0.999', 0.999],
  ])('reads %s', (text, value) => {
    expect(alpha(text, '--alpha')).toBe(value);
  });

  it.each(['0', '1', '2', '-0.1', '0,05', 'abc', '', '.', '1e-999'])('refuses %j', async (text) => {
    const problem = await problemOf(() => alpha(text, '--alpha'));
    expect(problem).toMatchObject({ code: 'bad-number', place: '--alpha', hint: 'write --alpha 0.05' });
  });

  it.each([
    ['95', '0.95'],
    ['95%', '0.95'],
    ['5%', '0.05'],
    ['99.5', '0.995'],
  ])('takes %s for a percentage and says how to write it', async (text, meant) => {
    expect((await problemOf(() => alpha(text, '--alpha'))).hint).toBe(`write --alpha ${meant}`);
  });
});

describe('names from a list', () => {
  const tail = oneOf(['upper', 'lower', 'both']);

  it('takes a name as it is written and no other way', async () => {
    expect(tail('both', '--tail')).toBe('both');
    expect((await problemOf(() => tail('Both', '--tail'))).hint).toContain('did you mean both?');
  });

  it('suggests the nearest and lists all', async () => {
    expect(await problemOf(() => tail('uper', '--tail'))).toMatchObject({
      code: 'unknown-value',
      message: '"uper" is not a value of --tail',
      hint: 'did you mean upper? allowed: upper, lower, both',
    });
  });
});

it('an empty text is refused', async () => {
  expect(await problemOf(() => anyText('', '--seed'))).toMatchObject({ code: 'empty-value', place: '--seed' });
  expect(anyText(' ', '--seed')).toBe(' ');
});
