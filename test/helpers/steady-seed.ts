// The same arbitrary cases on every run, so that a failure is one of the change at hand. `TEST_SEED=random npm test` looks for
// new ones; a failure prints the seed that repeats it.
import fc from 'fast-check';

const wish = process.env['TEST_SEED'];

if (wish !== 'random') fc.configureGlobal({ seed: wish === undefined ? 20_261_201 : Number(wish) });
