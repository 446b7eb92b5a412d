// Ctrl-C ends the run with 130, as shells count it.

/** Starts listening; the returned function stops it. Nothing is left behind: files are only put in place when whole. */
export function endOnInterrupt(): () => void {
  // The one place that calls exit: the work under way is to be dropped, and nothing has been written yet.
  const end = (): void => process.exit(130);
  process.once('SIGINT', end);
  return () => process.removeListener('SIGINT', end);
}
