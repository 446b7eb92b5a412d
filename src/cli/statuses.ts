// Exit statuses and what they mean, for every help screen.

export const statuses: readonly (readonly [string, string])[] = [
  ['0', 'finished, whatever the p-value is'],
  ['1', 'the data or a file cannot be used, or a self check differs'],
  ['2', 'the command line is wrong'],
  ['3', 'exact work would exceed the stated bound'],
  ['4', 'a replay differs from what was saved'],
  ['130', 'interrupted (ended by the signal)'],
];
