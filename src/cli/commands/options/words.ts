// Words that the help of several options shares.

export const either = (names: readonly string[]): string => names.join(', ');
