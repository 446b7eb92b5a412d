// What a stated value can be of: two proportions, first minus second or first over second, or their odds.
export const nullValueMeasures = ['difference', 'ratio', 'odds-ratio'] as const;
export type NullValueMeasure = (typeof nullValueMeasures)[number];
