import { describe, expect, it } from 'vitest';
import { nearPath } from '../../../src/cli/streams/near-path.js';

describe('a path that is near', () => {
  it.each([
    ['fixtures/demo/orchid_forms.tsv', 'fixtures/demo/orchid-forms.tsv'],
    ['fixture/demo/Orchid-Forms.tsv', 'fixtures/demo/orchid-forms.tsv'],
    ['./pakage.json', 'package.json'],
    ['fixtures/demo/orchid-forms', 'fixtures/demo/orchid-forms.tsv'],
  ])('%s is %s', async (typed, meant) => {
    expect(await nearPath(typed)).toBe(meant);
  });

  it('is none where a part is like nothing there', async () => {
    expect(await nearPath('no/such/place.csv')).toBeUndefined();
    expect(await nearPath('fixtures/zzzzzzzzzz.csv')).toBeUndefined();
  });
});
