// Every example in the README prints what the README shows.
import { describe, expect, it } from 'vitest';
import { outputOf, pictureShownAndDrawn, readmeExamples } from '../helpers/readme-examples.js';

const examples = readmeExamples();

describe('the README', () => {
  it('shows at least ten examples', () => {
    expect(examples.length).toBeGreaterThanOrEqual(10);
  });

  it.each(examples)('$ $command', async ({ command, output }) => {
    expect(await outputOf(command)).toBe(output);
  });

  it('shows the picture that its example draws', async () => {
    const { shown, drawn, text } = await pictureShownAndDrawn();
    expect(drawn).toBe(shown);
    expect(text).toContain('](fixtures/demo/seed-lots.svg)');
  });

  it('is short enough to be read', async () => {
    const { text } = await pictureShownAndDrawn();
    expect(text.split('\n').length).toBeLessThanOrEqual(700);
  });
});
