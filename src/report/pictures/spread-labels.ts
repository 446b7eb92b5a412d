// Labels beside narrow things, moved apart as little as it takes for none to lie over another.

/**
 * @param wished middles, rising
 * @param heights of the labels
 * @returns middles within [top, bottom] as far as all find room there, in the same order.
 */
export function spreadLabels(
  wished: readonly number[],
  heights: readonly number[],
  top: number,
  bottom: number,
): number[] {
  const apart = (k: number): number => (heights[k]! + heights[k + 1]!) / 2;
  const places = [...wished];
  for (let k = 0; k < places.length; k++) {
    const least = k === 0 ? top + heights[0]! / 2 : places[k - 1]! + apart(k - 1);
    places[k] = Math.max(places[k]!, least);
  }
  for (let k = places.length - 1; k >= 0; k--) {
    const most = k === places.length - 1 ? bottom - heights[k]! / 2 : places[k + 1]! - apart(k);
    places[k] = Math.min(places[k]!, most);
  }
  return places;
}
