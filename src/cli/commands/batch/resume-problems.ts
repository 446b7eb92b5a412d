// Why a run cannot be gone on with, in words.
import { usageProblem, type Problem } from '../../../problem/problem.js';
import { journalOf, partialOf } from '../../streams/unfinished-file.js';

const startAnew = (path: string): string => `delete "${partialOf(path)}" and "${journalOf(path)}" to start anew`;

export const unfinishedThere = (path: string): Problem =>
  usageProblem({
    code: 'unfinished-run',
    message: `results of an unfinished run are kept in "${partialOf(path)}"`,
    place: '--output',
    hint: `add --resume to go on with it, or ${startAnew(path)}`,
  });

/** @param setting the first that differs */
export const otherRun = (path: string, setting: string): Problem =>
  usageProblem({
    code: 'other-run',
    message: `the unfinished run in "${partialOf(path)}" is another one: it differs in ${setting}`,
    place: '--resume',
    hint: `give the same command as then, or ${startAnew(path)}`,
  });

export const cannotTakeUp = (path: string): Problem =>
  usageProblem({
    code: 'changed-results',
    message: `"${partialOf(path)}" does not hold what its run has written`,
    place: '--resume',
    hint: startAnew(path),
  });

export const otherInput = (path: string, units: number): Problem =>
  usageProblem({
    code: 'other-input',
    message: `the first ${units} tables or lines are not those that the unfinished run in "${partialOf(path)}" has read`,
    place: '--resume',
    hint: `give the same input as then, or ${startAnew(path)}`,
  });

export const nothingUnfinished = (path: string): Problem =>
  usageProblem({
    code: 'nothing-to-resume',
    message: `"${path}" is there and no unfinished run beside it`,
    place: '--resume',
    hint: 'it is whole; leave --resume out to make it anew',
  });
