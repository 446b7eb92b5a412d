// Do labels read as ordered levels? Numbers, ranges and doses that rise or fall, roman numerals, and words of common scales.

/** Words of scales from low to high; a label counts as the word that it is or begins with. */
const scales: readonly (readonly string[])[] = [
  ['none', 'very low', 'low', 'medium', 'moderate', 'high', 'very high'],
  ['none', 'trace', 'slight', 'mild', 'moderate', 'marked', 'severe', 'very severe', 'fatal'],
  ['none', 'few', 'some', 'many', 'all'],
  ['never', 'seldom', 'rarely', 'sometimes', 'often', 'usually', 'always'],
  ['never', 'former', 'current'],
  ['very poor', 'poor', 'fair', 'good', 'very good', 'excellent'],
  ['much worse', 'worse', 'unchanged', 'same', 'better', 'much better'],
  ['strongly disagree', 'disagree', 'neutral', 'undecided', 'agree', 'strongly agree'],
  ['very small', 'small', 'medium', 'large', 'very large'],
  ['light', 'moderate', 'heavy'],
  ['young', 'middle', 'old'],
  ['primary', 'secondary', 'tertiary'],
  ['control', 'low', 'mid', 'medium', 'high'],
  ['monday', 'tuesday', 'wednesday', 'thursday', 'friday', 'saturday', 'sunday'],
];

/** True for three labels and more that rise, or fall, all the way. */
export function looksOrdered(labels: readonly string[]): boolean {
  if (labels.length < 3) return false;
  const plain = labels.map((label) =>
    label
      .trim()
      .toLowerCase()
      .replace(/[\s_-]+/g, ' '),
  );
  return [numbersIn(labels), romansIn(plain), ...scales.map((scale) => placesIn(scale, plain))].some(
    (places) => places !== undefined && isMonotone(places),
  );
}

const isMonotone = (places: readonly number[]): boolean =>
  [1, -1].some((sign) => places.every((place, k) => k === 0 || sign * (place - places[k - 1]!) > 0));

const numberPattern = /\d+(?:[.,]\d+)?/;

/** Each label a number, or a range, or with a unit or sign around it: "0", "10 mg", "20-29", "<5", "60+"; not names that end in one. */
function numbersIn(labels: readonly string[]): number[] | undefined {
  const found = labels.map((label) => {
    const text = label.trim();
    if (
      !/^(?:(?:stage|grade|class|phase|level|dose|week|day|month|year|visit|quarter) )?[<>≤≥=+-]*\s*\d+(?:[.,]\d+)?\s*(?:(?:-|–|to)\s*\d+(?:[.,]\d+)?)?\s*(?:\+|%|[a-zµ]{1,6}(?:\/[a-z]{1,4})?)?$/i.test(
        text,
      )
    ) {
      return undefined;
    }
    const value = Number(numberPattern.exec(text)![0].replace(',', '.'));
    const sign = /^-\s*\d/.test(text) ? -1 : 1;
    return sign * value + (/^</.test(text) ? -0.5 : /^>/.test(text) ? 0.5 : 0);
  });
  return found.every((value) => value !== undefined) ? found : undefined;
}

const romans = ['0', 'i', 'ii', 'iii', 'iv', 'v', 'vi', 'vii', 'viii', 'ix', 'x'];

/** "stage i", "grade iv": the same word before each, or none. */
function romansIn(plain: readonly string[]): number[] | undefined {
  const parts = plain.map((label) => /^(?:(stage|grade|class|phase|level|type) )?([ivx0]+)$/.exec(label));
  if (parts.some((part) => part === null || !romans.includes(part[2]!))) return undefined;
  return parts.map((part) => romans.indexOf(part![2]!));
}

function placesIn(scale: readonly string[], plain: readonly string[]): number[] | undefined {
  const places = plain.map((label) => scale.indexOf(label));
  return places.includes(-1) ? undefined : places;
}
