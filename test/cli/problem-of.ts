// The problem that a piece of work ends with, for tests that look at its parts.
import { Problem } from '../../src/problem/problem.js';

export async function problemOf(work: () => unknown): Promise<Problem> {
  try {
    await work();
  } catch (thrown) {
    if (thrown instanceof Problem) return thrown;
    throw thrown;
  }
  throw new Error('nothing was thrown');
}
