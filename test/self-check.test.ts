// The shipped answers: made from the reference data and nothing else, all in agreement, and able to disagree.
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { selfCheckText } from '../fixtures/reference/generator/write-self-check.js';
import { main } from '../src/cli/main.js';
import { renderSelfCheck, selfCheckFormats } from '../src/report/self-check.js';
import { defaultSettings } from '../src/report/format.js';
import { selfCheckJsonSchema } from '../src/result/self-check-declaration.js';
import { referenceAnswersJsonSchema } from '../src/self-check/read-answers.js';
import { fakeShell } from './cli/fake-shell.js';
import { selfCheck, shippedCases } from '../src/self-check.js';
import { pairedNames } from '../src/statistic/paired.js';
import { statisticNames } from '../src/statistic/registry.js';

const machine = { runtime: 'test', engine: 'test', system: 'test', architecture: 'test' };
const cases = await shippedCases();
const report = await selfCheck(cases, machine);
const valid = new Ajv2020({ strict: false }).compile(selfCheckJsonSchema());

describe('the shipped answers', () => {
  it('are what the reference data give (npm run fixtures)', () => {
    expect(readFileSync('src/self-check/answers.json', 'utf8')).toBe(selfCheckText());
  });

  it('ask for every statistic of one table and of pairs, exact and sampled', () => {
    const asked = new Set(cases.map(({ options }) => options.statistic));
    for (const name of [...statisticNames, ...pairedNames.filter((one) => one !== 'mcnemar')]) {
      expect(asked, name).toContain(name);
    }
    expect(cases.some(({ options }) => options.paired && options.statistic === undefined)).toBe(true);
    expect(cases.some(({ strata }) => strata !== undefined)).toBe(true);
    expect(cases.filter(({ options }) => options.seed !== undefined).length).toBeGreaterThanOrEqual(4);
    expect(new Set(cases.map(({ id }) => id)).size).toBe(cases.length);
  });

  it('all agree here', () => {
    const differing = report.cases.flatMap(({ id, answers }) =>
      answers.filter(({ agrees }) => !agrees).map((answer) => ({ id, ...answer })),
    );
    expect(differing).toEqual([]);
    expect(report.verdict).toBe('agrees');
    expect(report.answersCompared).toBe(cases.reduce((sum, { answers }) => sum + answers.length, 0));
  });
});

describe('a report', () => {
  it('keeps its schema', () => {
    valid(JSON.parse(renderSelfCheck(report, 'json', defaultSettings)));
    expect(valid.errors).toBeNull();
  });

  it('differs where one answer is off by little, and where a case cannot be run', async () => {
    const [first] = cases;
    const wrong = {
      ...first!,
      answers: first!.answers.map((one) => ({ ...one, expected: one.expected * (1 + 1e-10) })),
    };
    const broken = { ...first!, id: 'broken', options: { statistic: 'none-such' } };
    const lost = {
      ...first!,
      id: 'lost',
      answers: [{ ...first!.answers[0]!, path: ['effects', { name: 'none' }, 'p'] }],
    };
    const bad = await selfCheck([wrong, broken, lost], machine);
    expect(bad.verdict).toBe('differs');
    expect(bad.cases.map(({ agrees }) => agrees)).toEqual([false, false, false]);
    expect(bad.cases[1]!.answers[0]).toMatchObject({ obtained: null, reason: expect.stringContaining('none-such') });
    expect(bad.cases[2]!.answers[0]).toMatchObject({ obtained: null, difference: null });
    valid(JSON.parse(JSON.stringify(bad)));
    expect(valid.errors).toBeNull();
    const text = renderSelfCheck(bad, 'text', defaultSettings);
    expect(text).toContain('DIFFERS');
    expect(text).toContain('do not rely on this copy');
  });

  it.each(selfCheckFormats.filter((format) => format !== 'html'))('shows every case as %s', (format) => {
    const text = renderSelfCheck(report, format, defaultSettings);
    for (const { id } of cases) expect(text).toContain(id);
  });

  it('fits 40 and 80 columns', () => {
    for (const width of [40, 80]) {
      const lines = renderSelfCheck(report, 'text', { ...defaultSettings, width }).split('\n');
      expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(width);
    }
  });
});

describe('keepsum selfcheck --answers', () => {
  const [first] = cases;
  const folder = mkdtempSync(join(tmpdir(), 'keepsum-answers-'));
  afterAll(() => rmSync(folder, { recursive: true }));
  async function checked(answers: unknown, ...words: string[]) {
    const path = join(folder, 'answers.json');
    writeFileSync(path, JSON.stringify(answers));
    const shell = fakeShell({});
    return { status: await main(['selfcheck', '--answers', path, '--quiet', ...words], shell), ...shell.written };
  }

  it('ends with 0 where all agree, and with 1 where one was tampered with', async () => {
    expect(await checked([first])).toMatchObject({ status: 0, err: '' });
    const [answer, ...others] = first!.answers;
    const tampered = { ...first!, answers: [{ ...answer!, expected: answer!.expected * 1.001 }, ...others] };
    for (const format of selfCheckFormats) {
      const { status, out } = await checked([tampered], '--format', format);
      expect(status, format).toBe(1);
      expect(out, format).toMatch(/differs/i);
    }
  });

  it('keeps a published schema, as do the answers that ship', async () => {
    const shape = new Ajv2020({ strict: false }).compile(referenceAnswersJsonSchema());
    expect(shape(JSON.parse(selfCheckText())), JSON.stringify(shape.errors)).toBe(true);
    for (const wrong of [
      [],
      {},
      [{ ...first!, answers: [] }],
      [{ ...first!, id: 3 }],
      [{ ...first!, counts: undefined }],
    ]) {
      const { status, out, err } = await checked(wrong);
      expect({ status, out }).toEqual({ status: 1, out: '' });
      expect(err).toContain('keepsum schema reference-answers');
    }
  });
});
