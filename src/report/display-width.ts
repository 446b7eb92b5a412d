// How many columns of a terminal a text takes, and cutting or breaking it at a column without splitting a character.
// East Asian wide characters and emoji count as two, marks that sit on another character as none.
import { eastAsianWidth } from 'get-east-asian-width';

// Basic Latin, Latin-1, Latin Extended, Greek and Cyrillic letters: one column each, no marks that combine. Most labels
// stay here and never wake the segmenter below, which takes some 14 ms to build.
const plainText = /^[\x20-\x7e\xa0-\xac\xae-\u02ff\u0370-\u0482\u048a-\u052f]*$/;

const zeroWidth = /^[\p{Mn}\p{Me}\p{Cf}\p{Cc}\p{Default_Ignorable_Code_Point}]$/u;
/** Clusters that terminals draw as one picture of two columns: emoji proper, emoji by selector, flags, keycaps. */
const picture =
  /\p{Emoji_Presentation}|\p{Extended_Pictographic}\ufe0f|^\p{Regional_Indicator}{2}|^[0-9#*]\ufe0f?\u20e3/u;

/** Letters that join into one syllable of two columns. */
const hangulParts = /[\u1100-\u11ff]/;

let segmenter: Intl.Segmenter | undefined;

function clustersOf(text: string): string[] {
  if (plainText.test(text)) return text.split('');
  segmenter ??= new Intl.Segmenter('en');
  return Array.from(segmenter.segment(text), ({ segment }) => segment);
}

function clusterWidth(cluster: string): number {
  if (plainText.test(cluster)) return cluster.length;
  if (picture.test(cluster)) return 2;
  let width = 0;
  for (const character of hangulParts.test(cluster) ? cluster.normalize('NFC') : cluster) {
    if (!zeroWidth.test(character)) width += eastAsianWidth(character.codePointAt(0)!);
  }
  return width;
}

/** Columns that a text without control characters takes. */
export function displayWidth(text: string): number {
  if (plainText.test(text)) return text.length;
  return clustersOf(text).reduce((width, cluster) => width + clusterWidth(cluster), 0);
}

/** Breaks a text into pieces of at most `width` columns (at least 2, so that any one character fits). */
export function breakAt(text: string, width: number): string[] {
  const pieces = [''];
  let used = 0;
  for (const cluster of clustersOf(text)) {
    const wide = clusterWidth(cluster);
    if (used + wide > width) {
      pieces.push('');
      used = 0;
    }
    pieces[pieces.length - 1] += cluster;
    used += wide;
  }
  return pieces;
}

/** At most `width` columns of a text, its end replaced by an ellipsis where it is longer. */
export function cutTo(text: string, width: number): string {
  return displayWidth(text) <= width ? text : `${firstColumns(text, width - 1).trimEnd()}…`;
}

/** The same, but with the ellipsis in the middle: for labels that differ in their endings only. */
export function cutInside(text: string, width: number): string {
  if (displayWidth(text) <= width) return text;
  const tail = lastColumns(text, Math.floor((width - 1) / 2));
  return `${firstColumns(text, width - 1 - displayWidth(tail))}…${tail}`;
}

const firstColumns = (text: string, width: number): string => takeWhileFits(clustersOf(text), width).join('');

const lastColumns = (text: string, width: number): string =>
  takeWhileFits(clustersOf(text).reverse(), width).reverse().join('');

function takeWhileFits(clusters: readonly string[], width: number): string[] {
  let used = 0;
  const end = clusters.findIndex((cluster) => (used += clusterWidth(cluster)) > width);
  return clusters.slice(0, end < 0 ? clusters.length : end);
}

export const padRight = (text: string, width: number): string => text + spaces(width - displayWidth(text));
export const padLeft = (text: string, width: number): string => spaces(width - displayWidth(text)) + text;

const spaces = (count: number): string => ' '.repeat(Math.max(0, count));
