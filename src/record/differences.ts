// Two JSON values held against each other: every place where they are not the same, to the last digit.

export interface Difference {
  /** Where, as in `pValues[0].p`. */
  readonly field: string;
  /** undefined where one of them has nothing there. */
  readonly recorded: unknown;
  readonly obtained: unknown;
}

/** @param passOver fields that may differ, by their full name. */
export function differencesBetween(
  recorded: unknown,
  obtained: unknown,
  passOver: ReadonlySet<string> = new Set(),
  field = '',
): Difference[] {
  if (Object.is(recorded, obtained) || passOver.has(field)) return [];
  if (Array.isArray(recorded) && Array.isArray(obtained)) {
    const length = Math.max(recorded.length, obtained.length);
    return Array.from({ length }, (_, k) =>
      differencesBetween(recorded[k], obtained[k], passOver, `${field}[${k}]`),
    ).flat();
  }
  if (isRecord(recorded) && isRecord(obtained)) {
    const names = new Set([...Object.keys(recorded), ...Object.keys(obtained)]);
    return [...names].flatMap((name) =>
      differencesBetween(recorded[name], obtained[name], passOver, field === '' ? name : `${field}.${name}`),
    );
  }
  return [{ field, recorded, obtained }];
}

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
