// Every example in the README prints what the README shows.
import { describe, expect, it } from 'vitest';
import { outputOf, readmeExamples } from '../helpers/readme-examples.js';

const examples = readmeExamples();

describe('the README', () => {
  it('shows at least ten examples', () => {
    expect(examples.length).toBeGreaterThanOrEqual(10);
  });

  it.each(examples)('$ $command', async ({ command, output }) => {
    expect(await outputOf(command)).toBe(output);
  });
});
