// What every format owes to every result, whatever its labels hold.
import fc from 'fast-check';
import stringWidth from 'string-width';
import { describe, expect, it } from 'vitest';
import { formatNames, formats, render } from '../../src/report/formats.js';
import type { Result } from '../../src/result/result.js';
import { methodsFor } from '../../src/result/methods.js';
import { sentenceFor } from '../../src/result/sentence.js';
import { beforeWords, pearsonSampled, sampleResults, waldExact } from '../helpers/sample-results.js';

const label = fc.oneof(
  fc.string({ unit: 'grapheme', maxLength: 60 }),
  fc.string({ unit: 'binary', maxLength: 20 }),
  fc.constantFrom('\u001b]0;x\u0007', '\u202eabc', '=1+1', '<b>', '返品'.repeat(20), 'x'.repeat(200), ''),
);
const labels = (most: number) => fc.uniqueArray(label, { minLength: 2, maxLength: most });
const count = fc.oneof(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 1, max: 2 ** 45 }));

/** A table of any shape and labels, seeds and notes of any characters; two groups where it is 2x2. */
const anyResult = fc
  .tuple(labels(6), labels(12), fc.array(count, { minLength: 72, maxLength: 72 }), label, label)
  .map(([rowLabels, columnLabels, numbers, seed, note]): Result => {
    const counts = rowLabels.map((_, i) => columnLabels.map((_, j) => numbers[i * 12 + j]!));
    const isTwoByTwo = rowLabels.length === 2 && columnLabels.length === 2;
    const model = isTwoByTwo ? waldExact : pearsonSampled;
    const [first, second] = rowLabels.map((text, i) => ({
      label: text,
      events: counts[i]![0]!,
      size: counts[i]![0]! + counts[i]![1]!,
      proportion: 0.25,
    }));
    const result = beforeWords({
      input: { rowLabels, columnLabels, counts },
      plan: {
        ...model.plan,
        seed,
        event: isTwoByTwo ? columnLabels[0]! : null,
        reference: isTwoByTwo ? rowLabels[1]! : null,
      },
      statistic: isTwoByTwo
        ? { ...model.statistic, event: columnLabels[0]!, groups: [first!, second!] }
        : model.statistic,
      pValues: model.pValues,
      notes: [{ code: 'test', text: note }],
    });
    return { ...result, sentence: sentenceFor(result), methods: methodsFor(result) };
  });

const actsUnseen = /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069]/u;

describe.each(formatNames)('%s', (format) => {
  it('ends in one line feed and says nothing undefined, for every sample', () => {
    for (const result of Object.values(sampleResults)) {
      const report = render(result, format);
      expect(report).toMatch(/[^\n]\n$/);
      expect(report).not.toMatch(/undefined|NaN|\[object/);
    }
    expect(formats[format].words).not.toBe('');
  });

  it('lets no control or reversing character through but its own line feeds', () => {
    fc.assert(
      fc.property(anyResult, (result) => {
        expect(render(result, format).replaceAll('\n', '')).not.toMatch(actsUnseen);
      }),
      { numRuns: 60 },
    );
  });

  it('is the same each time', () => {
    fc.assert(
      fc.property(anyResult, (result) => render(result, format) === render(result, format)),
      { numRuns: 20 },
    );
  });
});

it('no line of the text report is wider than asked, for any labels and any counts', () => {
  fc.assert(
    fc.property(anyResult, fc.integer({ min: 40, max: 140 }), (result, width) => {
      for (const line of render(result, 'text', { width }).split('\n')) {
        expect(stringWidth(line, { countAnsiEscapeCodes: true }), line).toBeLessThanOrEqual(width);
      }
    }),
    { numRuns: 150 },
  );
});

it('every count of the table stands in the text report, however it is folded', () => {
  fc.assert(
    fc.property(anyResult, fc.integer({ min: 40, max: 140 }), (result, width) => {
      const report = render(result, 'text', { width });
      for (const one of [...result.input.counts.flat(), ...result.input.rowTotals, result.input.total]) {
        expect(report.replaceAll(',', '')).toMatch(new RegExp(`\\b${one}\\b`));
      }
    }),
    { numRuns: 40 },
  );
});

it('a saved result whose words were tampered with acts on no terminal', () => {
  const tampered: Result = {
    ...waldExact,
    sentence: 'a\u001b[2Jb',
    methods: 'c\u202ed',
    notes: [{ code: 'x', text: '\u0007' }],
  };
  for (const format of formatNames) expect(render(tampered, format).replaceAll('\n', '')).not.toMatch(actsUnseen);
});
