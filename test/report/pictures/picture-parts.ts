// What a test asks of a picture: its elements, counted, and that nothing in it is not a number.
import { expect } from 'vitest';

/** Number of elements of a class. */
export const marksOf = (svg: string, name: string): number => svg.split(`class="${name}"`).length - 1;

/** Words that the picture shows, in the order of drawing. */
export const wordsOf = (svg: string): string[] =>
  [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, words]) => words!);

/** Tags that open are closed, in order; ids are used once; numbers are numbers. */
export function expectSoundSvg(svg: string): void {
  const open: string[] = [];
  for (const [, end, name, alone] of svg.matchAll(/<(\/?)([a-zA-Z]+)[^<>]*?(\/?)>/g)) {
    if (end === '/') expect(open.pop()).toBe(name);
    else if (alone !== '/') open.push(name!);
  }
  expect(open).toEqual([]);
  expect(svg).not.toMatch(/NaN|undefined|Infinity|="-[\d.]+" height|(width|height)="-/);
  const ids = [...svg.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
  expect(new Set(ids).size).toBe(ids.length);
  for (const [, id] of svg.matchAll(/url\(#([^)]*)\)/g)) expect(ids).toContain(id);
  const [, title, description] = /aria-labelledby="(\S+) (\S+)"/.exec(svg)!;
  expect(svg).toContain(`<title id="${title}">`);
  expect(svg).toContain(`<desc id="${description}">`);
}
