// Work of a few hundredths of a second ends before the optimized code that V8 makes for it has paid for its making: for 3 x 4
// to 4 x 5 tables of 70 to 600 counts that takes a quarter of the processor time of the whole run. So the command lets a function run
// longer before it is optimized, where little is foreseen. The library leaves its host's engine alone.
import type { ForeseenWork } from '../sampled-answer.js';

const leastUnits = 2e5;
const mostUnits = 1e8;
/** V8 counts bytecodes, by size, up to this before it looks whether a function is hot; left alone, to 67,584. */
const patience = 1_000_000;

export const isShort = ({ engine, workUnits }: ForeseenWork): boolean =>
  engine === 'network' && workUnits >= leastUnits && workUnits <= mostUnits;

/** Changes no digit. Does nothing but on the V8 of Node 20, where it was measured. */
export async function settleForShortWork(forecast: ForeseenWork): Promise<void> {
  if (!isShort(forecast) || !process.versions.v8.startsWith('11.')) return;
  const { setFlagsFromString } = await import('node:v8');
  setFlagsFromString(`--interrupt-budget=${patience}`);
}
