// How a value from the data is shown in a message: in double quotes, cut when long, with nothing in it that could
// move a terminal's cursor or turn the reading direction round.

const longest = 40;

/** C0, DEL, C1, direction marks and overrides, line and paragraph separators, the zero-width no-break space. */
const unsafe = /[\u0000-\u001f\u007f-\u009f\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g;

/** `"text"` with unsafe characters as `\u{hex}`, at most 40 characters of it. */
export function shownValue(text: string): string {
  const characters = [...text];
  const cut = characters.length > longest ? `${characters.slice(0, longest - 3).join('')}...` : text;
  return `"${cut.replace(unsafe, (character) => `\\u{${character.codePointAt(0)!.toString(16)}}`)}"`;
}

/** Up to twelve names, then how many more there are. */
export function shownList(names: readonly string[], most = 12): string {
  const shown = names.slice(0, most).map((name) => shownValue(name).slice(1, -1));
  return shown.join(', ') + (names.length > most ? ` and ${names.length - most} more` : '');
}
