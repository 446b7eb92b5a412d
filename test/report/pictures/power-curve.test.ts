import { describe, expect, it } from 'vitest';
import { planPower } from '../../../src/plan-power.js';
import { drawPowerCurve, lackOfCurve } from '../../../src/report/pictures/power-curve.js';
import { expectSoundSvg, marksOf, wordsOf } from './picture-parts.js';

const twoGroups = [
  { label: 'treated', probabilities: [0.7] },
  { label: 'control', probabilities: [0.4] },
];

describe('the power curve', () => {
  it('has a point for each size, higher where power is', async () => {
    const result = await planPower({
      groups: twoGroups,
      sizes: [
        [20, 20],
        [30, 30],
        [40, 40],
      ],
    });
    const svg = drawPowerCurve(result);
    expectSoundSvg(svg);
    // One more stands in the key.
    expect(marksOf(svg, 'keepsum-point')).toBe(4);
    expect(marksOf(svg, 'keepsum-interval')).toBe(0);
    const heights = [...svg.matchAll(/keepsum-point" cx="[^"]*" cy="([^"]*)"/g)].slice(1).map(([, y]) => Number(y));
    expect(heights).toEqual([...heights].sort((a, b) => b - a));
    expect(wordsOf(svg)).toEqual(expect.arrayContaining(['power', 'units in all groups together']));
  });

  it('shows what a simulation leaves unknown', async () => {
    const groups = [
      { label: 'a', probabilities: [0.2, 0.3, 0.5] },
      { label: 'b', probabilities: [0.5, 0.3, 0.2] },
    ];
    const result = await planPower({
      groups,
      sizes: [
        [10, 10],
        [20, 20],
      ],
      tables: 40,
      seed: 'plan',
      method: 'asymptotic',
    });
    const svg = drawPowerCurve(result);
    expectSoundSvg(svg);
    expect(marksOf(svg, 'keepsum-interval')).toBe(2);
  });

  it('is no curve with one size', async () => {
    expect(lackOfCurve(await planPower({ groups: twoGroups, sizes: [[20, 20]] }))).toContain('two sizes');
  });
});
