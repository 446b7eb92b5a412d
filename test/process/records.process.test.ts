// Saved results through the real command: every golden one replays, changed ones are found, families are adjusted.
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { adjustedJsonSchema } from '../../src/result/adjusted-declaration.js';
import { togetherJsonSchema } from '../../src/result/together-declaration.js';
import { replayJsonSchema } from '../../src/result/replay-declaration.js';
import { keepsum, root } from './run-command.js';

const golden = join(root, 'fixtures/golden');
const files = readdirSync(golden).filter((name) => name.endsWith('.json'));
const fits = (schema: object, value: unknown): boolean => new Ajv2020({ strict: false }).compile(schema)(value);

describe('keepsum replay', () => {
  it.each(files)('%s comes out the same to the last digit, on one thread and on three', async (name) => {
    for (const threads of ['1', '3']) {
      const { status, out } = await keepsum(['replay', join(golden, name), '--threads', threads]);
      expect({ status, out }).toEqual({ status: 0, out: 'Replayed: every digit is the same.\n' });
    }
  });

  it('checks the bytes of the data file', async () => {
    const record = join(golden, 'orchid-forms.json');
    const right = await keepsum(['replay', record, '--against', 'fixtures/demo/orchid-forms.tsv']);
    const wrong = await keepsum(['replay', record, '--against', 'fixtures/demo/lung-lesions.csv']);
    expect([right.status, wrong.status]).toEqual([0, 4]);
  });

  it('ends with 4 and names the field where a digit was changed', async () => {
    const record = readFileSync(join(golden, 'healing.json'), 'utf8').replace(
      /"p": 0\.005477494641581329/,
      '"p": 0.005477494641581320',
    );
    const { status, out } = await keepsum(['replay', '-', '--format', 'json'], { input: record });
    const report = JSON.parse(out) as { differing: { differences: { field: string }[] }[] };
    expect(status).toBe(4);
    expect(fits(replayJsonSchema(), report)).toBe(true);
    expect(report.differing[0]!.differences[0]!.field).toBe('pValues[0].p');
  });

  it('replays the lines of a batch, and says which did not come out', async () => {
    const lines = readFileSync(join(root, 'fixtures/demo/shift-results.ndjson'), 'utf8');
    expect((await keepsum(['replay', '-'], { input: lines })).status).toBe(0);
    const changed = await keepsum(['replay', '-'], { input: lines.replace('"counts":[[', '"counts":[[1') });
    expect(changed.status).toBe(4);
    expect(changed.out).toContain('3 of 4 results came out the same');
  });

  it('refuses what is no record, with its place', async () => {
    const { status, err } = await keepsum(['replay', '-'], { input: '{"a":1}\n' });
    expect(status).toBe(1);
    expect(err).toMatch(/^error: standard input:1: this is no result of keepsum.*\nhint: /);
  });
});

describe('keepsum adjust', () => {
  it('writes a line for each result, in its order, and says how many count', async () => {
    const { status, out, err } = await keepsum(['adjust', 'fixtures/demo/shift-results.ndjson', '--by', 'holm,tarone']);
    const lines = out.trim().split('\n').map((line) => JSON.parse(line) as { key: string }); // prettier-ignore
    expect(status).toBe(0);
    expect(lines.map(({ key }) => key)).toEqual(['press', 'glaze', 'kiln', 'crates']);
    for (const line of lines) expect(fits(adjustedJsonSchema(), line)).toBe(true);
    expect(err).toContain('family all: 4 tests count');
  });

  it('keeps families apart, and names the failed ones that it leaves out', async () => {
    const p = (value: number): string => `"pValues":[{"p":${value},"log10P":-1,"method":"sample"}]`;
    const input = `{"key":"a","family":"x",${p(0.01)}}\n{"key":"b","family":"x",${p(0.04)}}\n{"key":"c","error":{"code":"ragged-row"}}\n{"key":"d","family":"y",${p(0.04)}}\n`;
    const { out, err } = await keepsum(['adjust', '-', '--by', 'bonferroni', '--format', 'csv'], { input });
    expect(out).toBe(
      'key,family,tests,p,leastAttainable,bonferroni\na,x,2,0.01,,0.02\nb,x,2,0.04,,0.08\nd,y,1,0.04,,0.04\n',
    );
    expect(err).toContain('left out because they failed: c (ragged-row)');
  });
});

it('keepsum together gives the published shape, the same for the same seed', async () => {
  const words = ['together', 'fixtures/demo/trial-diary.csv', '--groups', 'arm', '--outcomes', 'nausea,rash,fever', '--missing', 'drop', '--seed', 'a', '--draws', '2000', '--format', 'json']; // prettier-ignore
  const [one, other] = [await keepsum(words), await keepsum(words)];
  expect(one.status).toBe(0);
  expect(other.out).toBe(one.out);
  const result = JSON.parse(one.out) as {
    outcomes: { alone: { p: number }; maxT: { p: number }; minP: { p: number } }[];
  };
  expect(fits(togetherJsonSchema(), result)).toBe(true);
  for (const { alone, maxT, minP } of result.outcomes) {
    expect(maxT.p).toBeGreaterThanOrEqual(alone.p);
    expect(minP.p).toBeGreaterThanOrEqual(alone.p);
  }
});

it('keepsum together refuses records that lack an outcome, with the place and a way out', async () => {
  const { status, err } = await keepsum([
    'together',
    'fixtures/demo/trial-diary.csv',
    '--groups',
    'arm',
    '--outcomes',
    'nausea,fever',
  ]);
  expect(status).toBe(1);
  expect(err).toMatch(
    /^error: fixtures\/demo\/trial-diary\.csv:\d+:\d+: the value of an outcome is missing\nhint: add --missing drop/,
  );
});
