// Which characters of a picture no font can draw. A renderer puts the same box in place of each of them, so a character that
// looks like one that no font has is one that is lacking; nothing needs to be known of the fonts.

/** The pixels of a few words; what they look like is only compared. */
export type Renders = (words: string) => Uint8Array;

/** No font draws it: the standard assigns nothing to it, for good. */
const unassigned = '\u{10fffe}';

/** In their order, each once. Latin, Greek and Cyrillic letters and plain signs are not asked for: the shipped fonts have them. */
export function lackingIn(text: string, renders: Renders): string[] {
  const doubtful = /[^\0-\u052f\u1e00-\u206f\u2190-\u2193\u2212]/gu;
  const asked = [...new Set(text.match(doubtful) ?? [])].filter((character) => !/\p{M}|\p{Cc}|\p{Cf}/u.test(character));
  if (asked.length === 0) return [];
  const box = renders(unassigned);
  return asked.filter((character) => same(renders(character.padEnd(unassigned.length)), box));
}

const same = (one: Uint8Array, other: Uint8Array): boolean =>
  one.length === other.length && one.every((value, k) => value === other[k]);
