/** A whole number in digits, in groups of three: 1,234,567. (The language's own formatter takes 30 ms to load.) */
export const groupedDigits = (value: number): string => String(value).replace(/\B(?=(\d{3})+$)/g, ',');
