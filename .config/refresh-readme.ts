// npm run refresh:readme - runs the README's examples and writes down what they print.
import { refreshReadme } from '../test/helpers/readme-examples.js';

await refreshReadme();
