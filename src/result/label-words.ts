// Labels are data: how a label, a seed or any other text from outside is put into words without letting it act on a
// terminal. Control characters, terminal escapes, characters that turn the reading direction and characters that cannot
// be seen are spelled out; everything else stands as it came.

// Joiners and variation selectors are invisible too, but Persian, Indic scripts and emoji cannot be written without them.
const actsUnseen =
  /(?![\u200c\u200d\ufe00-\ufe0f])[\p{Cc}\p{Cs}\p{Zl}\p{Zp}\p{Bidi_Control}\p{Default_Ignorable_Code_Point}\ufff9-\ufffb]/gu;

/** Plain ASCII acts on nothing, and never wakes the expression above, which takes some 5 ms to build. */
const plain = /^[\n\x20-\x7e]*$/;

const shortNames: Readonly<Record<string, string>> = { '\n': '\\n', '\r': '\\r', '\t': '\\t' };

function spelledOut(character: string): string {
  const code = character.codePointAt(0)!;
  const hex = code.toString(16);
  if (code < 0x100) return shortNames[character] ?? `\\x${hex.padStart(2, '0')}`;
  return code > 0xffff ? `\\u{${hex}}` : `\\u${hex.padStart(4, '0')}`;
}

/** Any text from outside, fit to be printed: what would act on the screen instead of being seen is spelled out. */
export const shown = (text: string): string =>
  plain.test(text) && !text.includes('\n') ? text : text.replace(actsUnseen, spelledOut);

/** A label inside a sentence: shown, and in double quotes so that it is never read as part of the sentence. */
export const quoted = (label: string): string => `"${shown(label)}"`;

/** The same characters as JSON escapes: a JSON text keeps its meaning and stops acting on a terminal. Its own line feeds stay. */
export const shownJson = (json: string): string =>
  plain.test(json)
    ? json
    : json.replace(actsUnseen, (character) => (character === '\n' ? character : utf16Escapes(character)));

const utf16Escapes = (character: string): string =>
  character
    .split('')
    .map((unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, '0')}`)
    .join('');
