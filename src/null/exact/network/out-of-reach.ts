// Thrown when an exact computation cannot be held in the stated memory; callers turn it into a problem with its forecast.

export class OutOfReach extends Error {
  /** @param entries partial sums that may be held at once; Infinity when the nodes themselves are too many to number. */
  constructor(readonly entries: number) {
    super(`more than ${entries} partial sums would have to be held at once`);
  }
}
