// The text is walked a second time to find a place; that walk must see the same fields as the parser, wherever it is cut.
import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { csvOptions } from '../../src/input/csv-text.js';
import { FieldPlace, placeInText } from '../../src/input/field-place.js';
import { quoted } from './text-input.js';

const separators = [',', ';', '\t', '|'];
const bare = fc.string({ unit: fc.constantFrom('a', 'é', '😀', '7', '.', ' ', '#'), maxLength: 5 });
const rich = fc.string({
  unit: fc.constantFrom('a', '"', ',', ';', '\n', '\r', '\t', '|', '#', ' ', '😀'),
  maxLength: 6,
});
const field = fc.oneof(
  bare.map((text) => ({ written: text, value: text.trim() })),
  rich.map((text) => ({ written: quoted(text), value: text })),
);
const lineEnd = fc.constantFrom('\n', '\r\n', '\r');
const between = fc.constantFrom('', '', '# "no, field\n', '\n', '  \r\n');
const document = fc.array(fc.record({ fields: fc.array(field, { minLength: 2, maxLength: 4 }), lineEnd, between }), {
  minLength: 1,
  maxLength: 5,
});

/** Line and column after a text, by counting its characters. */
function after(text: string): { line: number; column: number } {
  const lines = text.split(/\r\n|\r|\n/);
  return { line: lines.length, column: [...lines.at(-1)!].length + 1 };
}

describe('the place of every field of any text', () => {
  it('is where its first character stands', () => {
    fc.assert(
      fc.property(
        document,
        fc.constantFrom(...separators),
        fc.nat(),
        fc.integer({ min: 1, max: 9 }),
        (lines, separator, pick, cut) => {
          // A first field that begins with # would make its line a comment.
          const usable = lines.filter(({ fields }) => !fields[0]!.written.trim().startsWith('#'));
          fc.pre(usable.length > 0);
          let text = '';
          const places: { record: number; field: number; line: number; column: number }[] = [];
          usable.forEach(({ fields, lineEnd: end, between: gap }, record) => {
            fields.forEach(({ written }, index) => {
              const lead = written.trim() === '' ? '' : written.slice(0, written.length - written.trimStart().length);
              places.push({ record, field: index, ...after(text + lead) });
              text += written + (index < fields.length - 1 ? separator : end);
            });
            text += gap;
          });
          const parsed: string[][] = parse(text, csvOptions(separator));
          expect(parsed).toEqual(usable.map(({ fields }) => fields.map(({ value }) => value)));
          const { record, field: index, ...place } = places[pick % places.length]!;
          const target = { record, field: index };
          expect(placeInText(text, separator, target)).toEqual(place);

          const inPieces = new FieldPlace(separator, target);
          const characters = [...text];
          for (let at = 0; at < characters.length; at += cut) inPieces.feed(characters.slice(at, at + cut).join(''));
          expect(inPieces.end()).toEqual(place);
        },
      ),
      { numRuns: 2000 },
    );
  });

  it('past the end of a record is the end of that record', () => {
    expect(placeInText('a,b\nc\nd', ',', { record: 1, field: 1 })).toEqual({ line: 2, column: 2 });
    expect(placeInText('a,b\nc', ',', { record: 1, field: 5 })).toEqual({ line: 2, column: 2 });
  });

  it('is not made up for a record that does not occur', () => {
    expect(placeInText('a,b\nc,d\n', ',', { record: 2, field: 0 })).toBeUndefined();
  });
});
