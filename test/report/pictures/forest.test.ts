import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import { drawPicture, lackOf } from '../../../src/report/pictures/pictures.js';
import { checked } from '../../helpers/checked-result.js';
import { expectSoundSvg, marksOf, wordsOf } from './picture-parts.js';

const clinics = {
  strata: [
    {
      label: 'north',
      counts: [
        [8, 2],
        [3, 9],
      ],
    },
    {
      label: 'south',
      counts: [
        [12, 12],
        [6, 14],
      ],
    },
    {
      label: '<west>',
      counts: [
        [5, 0],
        [1, 4],
      ],
    },
  ],
  rowLabels: ['new', 'old'],
  columnLabels: ['healed', 'open'],
};

describe('the forest of strata', () => {
  it('has a square for each finite odds ratio, an arrow for an infinite one, and a diamond for the common one', async () => {
    const result = checked(await analyse(clinics));
    const svg = drawPicture(result, 'strata');
    expectSoundSvg(svg);
    expect(marksOf(svg, 'keepsum-stratum')).toBe(2);
    expect(marksOf(svg, 'keepsum-beyond')).toBe(1);
    expect(marksOf(svg, 'keepsum-ink keepsum-common')).toBe(1);
    expect(marksOf(svg, 'keepsum-interval')).toBe(3);
    expect(wordsOf(svg)).toEqual(
      expect.arrayContaining(['north', 'south', '&lt;west&gt;', '12.0', '2.33', 'infinite']),
    );
  });

  it('shows the interval of Woolf: of 8, 2, 3, 9 it is 12 exp(+- 1.959964 sqrt(1/8 + 1/2 + 1/3 + 1/9))', async () => {
    const { strata } = await analyse(clinics);
    const factor = Math.exp(1.959963984540054 * Math.sqrt(1 / 8 + 1 / 2 + 1 / 3 + 1 / 9));
    const [low, high] = strata!.oddsRatioIntervals![0]!;
    expect(low).toBeCloseTo(12 / factor, 9);
    expect(high).toBeCloseTo(12 * factor, 9);
    expect(strata!.oddsRatioIntervals![2]).toBeNull();
  });

  it('wants strata of 2x2 tables', async () => {
    expect(
      lackOf(
        await analyse({
          counts: [
            [8, 2],
            [1, 9],
          ],
        }),
        'strata',
      )!.hint,
    ).toContain('--strata');
  });
});
