import { describe, expect, it } from 'vitest';
import { endingOf } from '../../src/cli/problem-text.js';
import { dataProblem, effortProblem, usageProblem } from '../../src/problem/problem.js';

const parts = { code: 'c', message: 'm', hint: 'h' };

describe('how a run that cannot finish ends', () => {
  it('says in two lines where and what, then what to do', () => {
    const { text } = endingOf(dataProblem({ ...parts, place: 'a.csv:2:3' }), false);
    expect(text).toBe('error: a.csv:2:3: m\nhint: h\n');
  });

  it('names an option once, even when the message does', () => {
    const problem = usageProblem({ ...parts, message: '--draws has no effect', place: '--draws' });
    expect(endingOf(problem, false).text).toBe('error: --draws has no effect\nhint: h\n');
  });

  it('has a status for each kind', () => {
    const statuses = [dataProblem(parts), usageProblem(parts), effortProblem(parts), new Error('x')];
    expect(statuses.map((thrown) => endingOf(thrown, false).status)).toEqual([1, 2, 3, 1]);
  });

  it('spells out what would steer a terminal or break the line', () => {
    const { text } = endingOf(dataProblem({ ...parts, place: 'a\u001b[2Jb\nc\u202ed' }), false);
    expect(text.split('\n')).toHaveLength(3);
    expect(text).not.toMatch(/[\u001b\u202e]/);
  });

  it('shows a stack for an unforeseen error only, and only when asked', () => {
    const bug = new TypeError('x is not a function');
    expect(endingOf(bug, false).text).toMatch(/^error: .*x is not a function.*\nhint: please report .*--debug.*\n$/);
    expect(endingOf(bug, true).text).toContain('problem-text.test.ts');
    expect(endingOf(dataProblem(parts), true).text).not.toContain('problem-text.test.ts');
  });
});
