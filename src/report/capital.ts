/** The words with a capital in front, as the beginning of a line; digits, quotes and labels in other scripts stay. */
export const capital = (words: string): string => words.replace(/^[a-z]/, (letter) => letter.toUpperCase());
