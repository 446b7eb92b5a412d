// The options of `keepsum test`, in the order of its help.
import { documents } from './options/documents.js';
import { planning } from './options/planning.js';
import { reading } from './options/reading.js';
import { reporting } from './options/reporting.js';
import { debugOption, helpOption } from './shared-options.js';

export const testOptions = {
  ...reading,
  ...planning,
  ...documents,
  ...reporting,
  debug: debugOption,
  help: helpOption,
};
