// The last step of the build: the man page beside the command.
import { writeFileSync } from 'node:fs';
import { manualPage } from '../src/cli/manual.js';

writeFileSync('dist/keepsum.1', await manualPage());
