// Threads run built files, so they are tried through the real command: they change the time, never a digit.
import { describe, expect, it } from 'vitest';
import { keepsum } from './run-command.js';

const table = ['18,20,15,5', '19,24,24,29', '26,17,14,14', '17,24,10,16'];
const run = async (more: string[]): Promise<string> => {
  const { out, err, status } = await keepsum([
    'test',
    ...table,
    '--method',
    'sample',
    '--format',
    'json',
    '--seed',
    't',
    ...more,
  ]);
  expect([status, err]).toEqual([0, '']);
  return out;
};

describe('threads', () => {
  it('1, 2, 3 and 8 give the same bytes for a fixed number of draws that is no multiple of a block', async () => {
    const one = await run(['--draws', '1234567', '--threads', '1']);
    for (const threads of ['2', '3', '8']) expect(await run(['--draws', '1234567', '--threads', threads])).toBe(one);
  });

  it('and for draws until settled, which start on one thread and end in the middle of what was asked for', async () => {
    // alpha just at the p of this table, so that many blocks are needed
    const settings = ['--draws', 'auto', '--alpha', '0.0357', '--relative-error', '0.01', '--most-draws', '1500000'];
    const one = await run([...settings, '--threads', '1']);
    expect(JSON.parse(one).pValues[0].errors[0].draws).toBeGreaterThan(500_000);
    for (const threads of ['2', '3']) expect(await run([...settings, '--threads', threads])).toBe(one);
  });

  it('a run that is settled while other threads are still drawing ends well', async () => {
    const wide = Array.from({ length: 8 }, (_, i) => Array.from({ length: 8 }, (__, j) => 40 + 30 * Number(i === j)));
    const rows = wide.map((row) => row.join());
    const { status, err, out } = await keepsum([
      'test',
      ...rows,
      '--method',
      'sample',
      '--seed',
      't',
      '--threads',
      '4',
    ]);
    expect([status, err]).toEqual([0, '']);
    expect(out).toMatch(/settled at or below the level/);
  });
});
