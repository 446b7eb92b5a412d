// keepsum help TOPIC: every name that an option takes is explained, with its source, as the program itself has it.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { main } from '../../src/cli/main.js';
import { topics, topicNames } from '../../src/cli/topics/all.js';
import { fixedSides } from '../../src/plan/design.js';
import { adjustments } from '../../src/family/adjust.js';
import { twoGroupTests } from '../../src/power/design.js';
import { methods, tails, twoSidedRules } from '../../src/plan/plan.js';
import { mentionsIn, sourceOf } from '../../src/result/citations.js';
import { pairedStatistics } from '../../src/statistic/paired.js';
import { statistics } from '../../src/statistic/registry.js';
import { stratifiedStatistics } from '../../src/statistic/stratified.js';
import { fakeShell } from './fake-shell.js';

async function run(words: string[], columns = 80) {
  const shell = fakeShell({ columns });
  return { status: await main(words, shell), ...shell.written };
}
const flat = (text: string): string => text.replace(/\s+/g, ' ');

describe('keepsum help TOPIC', () => {
  it('gives formula and source of every statistic', async () => {
    const { status, out, err } = await run(['help', 'statistics']);
    expect({ status, err }).toEqual({ status: 0, err: '' });
    for (const { name, formula, source } of [...statistics, ...pairedStatistics, ...stratifiedStatistics]) {
      expect(out).toContain(`\n${name}\n`);
      expect(flat(out)).toContain(flat(`formula: ${formula}`));
      expect(flat(out)).toContain(flat(`source: ${source}`));
    }
  });

  it.each([
    ['tails', tails],
    ['rules', twoSidedRules],
    ['methods', methods],
    ['adjustments', adjustments],
    ['planned-tests', twoGroupTests],
    ['designs', fixedSides.map((side) => `--fixed ${side}`)],
    ['exit-status', ['0', '1', '2', '3', '4', '130']],
    ['seeds', ['--seed TEXT']],
  ])('%s explains every one', async (topic, names) => {
    const { status, out } = await run(['help', topic]);
    expect(status).toBe(0);
    for (const name of names) expect(out).toMatch(new RegExp(`^${name}\n  \\S`, 'm'));
  });

  it('effects explains every measure that a result can hold', async () => {
    const counts = [
      [8, 2, 3],
      [1, 9, 4],
      [2, 5, 6],
    ];
    const small = [
      [8, 2],
      [1, 9],
    ];
    const strata = [small, small].map((table, k) => ({ label: String(k), counts: table }));
    const results = await Promise.all([
      analyse({ counts: small }, {}),
      analyse({ counts: small }, { paired: true }),
      analyse({ counts }, { ordered: 'both' }),
      analyse({ counts }, { paired: true }),
      analyse({ strata }, {}),
    ]);
    const names = new Set(results.flatMap(({ effects = [] }) => effects.map(({ name }) => name)));
    expect(names.size).toBeGreaterThan(15);
    const { out } = await run(['help', 'effects']);
    for (const name of names) expect(out).toMatch(new RegExp(`^${name}\n  \\S`, 'm'));
  });

  it('explains one name alone', async () => {
    expect((await run(['help', 'blaker'])).out).toMatch(/^blaker\n/);
    expect((await run(['help', 'pearson'])).out).toContain('source: Pearson (1900)');
  });

  it.each(topics.map(({ name }) => name))('%s keeps to 40, 80 and 120 columns', async (topic) => {
    for (const columns of [40, 80, 120]) {
      const { out } = await run(['help', topic], columns);
      expect(Math.max(...out.split('\n').map((line) => line.length))).toBeLessThanOrEqual(columns);
    }
  });

  it('names sources that the table of sources has', () => {
    const lines = topics.flatMap(({ entries, opening }) => [opening, ...entries.flatMap((entry) => entry.lines)]);
    const unknown = lines.flatMap(mentionsIn).filter((mention) => sourceOf(mention, false) === undefined);
    expect(unknown).toEqual([]);
  });
});

describe('keepsum help', () => {
  it('of a command is its --help', async () => {
    for (const name of ['test', 'power', 'help']) {
      expect((await run(['help', name])).out).toBe((await run([name, '--help'])).out);
    }
  });

  it('alone lists commands and topics', async () => {
    const { out } = await run(['help']);
    for (const { name } of topics) expect(out).toContain(`\n  ${name} `);
  });

  it.each([
    ['statistcs', 'statistics'],
    ['blakr', 'blaker'],
    ['tets', 'test'],
    ['kruskal', 'kruskal-wallis'],
  ])('suggests what %s may have meant', async (typed, meant) => {
    const { status, out, err } = await run(['help', typed]);
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toContain(`hint: did you mean keepsum help ${meant}?`);
  });

  it('lists the topics where nothing is near, and refuses two', async () => {
    expect((await run(['help', 'zzzzzzzz'])).err).toContain('allowed: statistics, tails');
    expect((await run(['help', 'tails', 'rules'])).status).toBe(2);
    expect(topicNames).toContain('pearson');
  });
});
