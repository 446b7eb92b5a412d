// Hatching, so that what matters is told apart by more than colour. Each picture has its own, named after it.
import { blue, element, orange, paper, type Markup } from './element.js';

/** Blue strokes upward: `id-hatching`. */
export const hatching = (id: string): Markup => element('defs', {}, pattern(`${id}-hatching`, blue, 45, 4, 2.2));

/** Of a mosaic: more (rising, blue) or fewer (falling, orange) than expected, wide and dense. */
export const residualHatching = (id: string): Markup =>
  element(
    'defs',
    {},
    pattern(`${id}-more-1`, blue, 45, 8, 1.6),
    pattern(`${id}-more-2`, blue, 45, 4, 2),
    pattern(`${id}-fewer-1`, orange, -45, 8, 1.6),
    pattern(`${id}-fewer-2`, orange, -45, 4, 2),
  );

const pattern = (id: string, colour: string, angle: number, spacing: number, stroke: number): Markup =>
  element(
    'pattern',
    { id, width: spacing, height: spacing, patternUnits: 'userSpaceOnUse', patternTransform: `rotate(${angle})` },
    element('rect', { class: 'keepsum-paper', width: spacing, height: spacing, fill: paper }),
    element('line', { x1: 0, y1: 0, x2: 0, y2: spacing, stroke: colour, 'stroke-width': stroke }),
  );
