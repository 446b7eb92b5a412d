// A seed for a run that was given none; it is echoed in the plan, so the run can be repeated.

/** Eight letters and digits that are hard to confuse, from the system's source of randomness (39 bits). */
export function freshSeed(): string {
  const alphabet = '23456789abcdefghjkmnpqrstuvwxyz';
  const bytes = new Uint32Array(8);
  globalThis.crypto.getRandomValues(bytes);
  return Array.from(bytes, (word) => alphabet[word % alphabet.length]).join('');
}
