// Every kind of analysis as a page: what each must say, that nothing runs over the width, and that nothing is said by colour.
import stringWidth from 'string-width';
import { beforeAll, describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { render } from '../../src/report/formats.js';
import type { Result } from '../../src/result/result.js';
import { kinds } from '../helpers/kinds.js';

const results = new Map<string, Result>();
beforeAll(async () => {
  for (const { name, table, options } of kinds) results.set(name, await analyse(table, options));
});
const names = kinds.map(({ name }) => name);
const running = (report: string): string => report.replace(/\s+/g, ' ');

describe.each(names)('%s', (name) => {
  it.each([40, 80, 120])('stays within %i columns', (width) => {
    for (const line of render(results.get(name)!, 'text', { width }).split('\n')) {
      expect(stringWidth(line), line).toBeLessThanOrEqual(width);
    }
  });

  it('reads in the order of the page', () => {
    const order = [
      'What was tested',
      'The table',
      'The strata',
      'The answer',
      'How strong is it?',
      'Do the strata agree?',
      'Which cells?',
      'Which lines differ?',
      'Expected counts under quasi-independence',
      'What another choice would change',
      'How fragile is it?',
      'Before you use it',
      'To run it again',
    ];
    const [, ...headings] = render(results.get(name)!, 'text')
      .split('\n')
      .filter((line) => /^\S/.test(line));
    const places = headings.map((heading) => order.indexOf(heading));
    expect(places).not.toContain(-1);
    expect(places).toEqual([...places].sort((a, b) => a - b));
  });

  it('shows the answer on the first screen of 24 lines, but for strata and missing records two more', () => {
    const lines = render(results.get(name)!, 'text').split('\n');
    const at = lines.indexOf('The answer');
    expect(at).toBeLessThanOrEqual(results.get(name)!.strata === undefined ? 20 : 24);
  });

  it('calls nothing significant and gives nobody stars', () => {
    const { sentence, methods } = results.get(name)!;
    const report = render(results.get(name)!, 'markdown');
    for (const words of [sentence, methods, report]) expect(words).not.toMatch(/significan|\*{3}|p < /i);
  });

  it('names tail, method and version, and the two-sided rule beside every two-tailed p', () => {
    const result = results.get(name)!;
    const report = running(render(result, 'text'));
    expect(result.sentence).toMatch(/upper-tailed|lower-tailed|two-tailed|one-tailed|is 1 whatever/);
    expect(result.methods).toMatch(/Computed with keepsum \d/);
    for (const [, after] of report.matchAll(/two-tailed((?: \S+){0,4})/g)) expect(after).toMatch(/rule: \w+/);
  });
});

describe('the sentence', () => {
  it.each(kinds.filter(({ effect }) => effect !== undefined))(
    '$name: holds the effect, $effect',
    ({ name, effect }) => {
      expect(results.get(name)!.sentence).toMatch(effect!);
    },
  );
});
