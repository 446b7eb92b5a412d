// The frame without a process: what goes to which stream, and which status comes back.
import { describe, expect, it } from 'vitest';
import { main } from '../../src/cli/main.js';
import { version } from '../../src/result/version.js';
import { fakeShell } from './fake-shell.js';

async function run(words: string[], changes: Parameters<typeof fakeShell>[0] = {}) {
  const shell = fakeShell(changes);
  return { status: await main(words, shell), ...shell.written };
}

describe('asking for help', () => {
  it('is answered on standard output with 0, anywhere among the options', async () => {
    for (const words of [['--help'], ['-h'], ['test', '--help'], ['test', '8,2', '--draws', '0', '-h']]) {
      const { status, out, err } = await run(words);
      expect({ status, err }).toEqual({ status: 0, err: '' });
      expect(out).toContain('Exit status');
    }
  });

  it('counts only before --', async () => {
    expect((await run(['schema', '--', '--help'])).status).toBe(2);
  });

  it('comes unasked, short and on standard error, with 2, when nothing was named at a terminal', async () => {
    for (const words of [[], ['test'], ['test', '--statistic', 'pearson']]) {
      const { status, out, err } = await run(words);
      expect({ status, out }).toEqual({ status: 2, out: '' });
      expect(err).toMatch(/^keepsum |^Tests whether/);
      expect(err).toContain('keepsum test 8,2 1,9');
      expect(err.split('\n').length).toBeLessThan(35);
    }
  });
});

it('--version prints the version and nothing else', async () => {
  expect(await run(['--version'])).toEqual({ status: 0, out: `${version}\n`, err: '' });
});

describe('wrong usage ends with 2, two lines on standard error and nothing on standard output', () => {
  it.each([
    ['an unknown command', ['tets', '8,2'], 'there is no command "tets"', 'did you mean test?'],
    ['a command like no other', ['nonsense'], 'there is no command "nonsense"', 'allowed: test, batch, draw,'],
    ['a table where a command is wanted', ['8,2', '1,9'], 'there is no command "8,2"', 'keepsum test 8,2'],
    ['an option where a command is wanted', ['--draws', '5'], '--draws stands where', 'options come after'],
    ['an unknown option', ['test', '--tial', 'both'], 'there is no option --tial', 'did you mean --tail?'],
    ['an unknown value', ['test', '8,2', '--format', 'jsn'], '"jsn" is not a value of --format', 'did you mean json?'],
    ['an unknown statistic', ['test', '8,2', '--statistic', 'pearsn'], '"pearsn"', 'did you mean pearson?'],
    ['a missing value', ['test', '8,2', '--seed'], '--seed comes last', 'write --seed TEXT'],
    ['an empty seed', ['test', '8,2', '1,9', '--seed='], '--seed: the value is empty', '--seed'],
    ['draws 0', ['test', '8,2', '--draws', '0'], '--draws: "0"', '--draws 100000'],
    ['half a draw', ['test', '8,2', '--draws', '1.5'], '--draws: "1.5"', '--draws 100000'],
    ['alpha 2', ['test', '8,2', '--alpha', '2'], '--alpha: "2"', '--alpha 0.05'],
    ['effort in words', ['test', '8,2', '--effort', 'abc'], '--effort: "abc"', '--effort 1e9'],
    ['rows with a file', ['test', '8,2', 'x.csv'], '"8,2" is a row of counts', './'],
    ['--raw-csv for another format', ['test', '8,2', '--raw-csv'], '--raw-csv', '--format csv'],
    ['two documents', ['test', '8,2', '--brief', '--citations', 'text'], '--brief and --citations', 'one of them'],
    ['one line of json', ['test', '8,2', '--brief', '--format', 'json'], '--brief and --format json', 'one of them'],
    ['blanks in a row', ['test', '8,', '2', '1,', '9'], 'a row has a blank in it', '8,2 1,9'],
    ['an unknown topic', ['help', 'tailz'], 'no topic or command "tailz"', 'did you mean keepsum help tails?'],
    ['an unknown shell', ['completions', 'bsh'], 'no completions for "bsh"', 'did you mean bash?'],
    ['a word for selfcheck', ['selfcheck', 'x'], 'takes no "x"', 'keepsum selfcheck'],
    ['no schema named', ['schema'], 'no schema is named', 'keepsum schema result'],
    ['an unknown schema', ['schema', 'rslt'], '"rslt"', 'did you mean result?'],
    ['two schemas', ['schema', 'result', 'result'], 'one schema at a time', 'keepsum schema result'],
    ['an output that cannot be', ['test', '8,2', '1,9', '--output', 'no/such/x'], '"no/such/x"', '"no/such"'],
  ])('%s', async (_case, words, problem, hint) => {
    const { status, out, err } = await run(words);
    expect({ status, out }).toEqual({ status: 2, out: '' });
    const [first, second, ...rest] = err.split('\n');
    expect(rest).toEqual(['']);
    expect(first).toMatch(/^error: /);
    expect(first).toContain(problem);
    expect(second).toMatch(/^hint: /);
    expect(second).toContain(hint);
  });
});

describe('data that cannot be used ends with 1', () => {
  it.each([
    ['a negative count that looks like an option', ['test', '-8,2', '1,9'], '"-8" is negative'],
    ['a file that is not there', ['test', 'package.jsn'], 'did you mean package.json?'],
    ['a directory', ['test', 'src'], 'src: this is a directory'],
    ['a path through a file', ['test', 'package.json/x'], '(ENOTDIR)'],
    ['a file in no directory', ['test', 'no/such.csv'], 'there is no directory "no"'],
    ['a slip in a row', ['test', '8,a,b'], 'if a row of counts was meant'],
  ])('%s', async (_case, words, part) => {
    const { status, out, err } = await run(words);
    expect({ status, out }).toEqual({ status: 1, out: '' });
    expect(err).toContain(part);
    expect(err.split('\n')).toHaveLength(3);
  });

  it('input that is piped and empty', async () => {
    const { status, err } = await run(['test'], { input: '' });
    expect(status).toBe(1);
    expect(err).toContain('standard input');
  });
});

it('the schema is one JSON document', async () => {
  const { status, out, err } = await run(['schema', 'result']);
  expect({ status, err }).toEqual({ status: 0, err: '' });
  expect(JSON.parse(out)).toMatchObject({ $id: 'keepsum/result/1', type: 'object' });
});
