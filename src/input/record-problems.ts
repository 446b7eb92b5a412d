// What can be wrong with raw records, in words.
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';
import { badCell, countProblem } from './count-faults.js';
import { missingLevel, mostLevels } from './levels.js';
import type { RecordColumns } from './record-columns.js';
import { shownValue } from './shown-value.js';

export const badCount = (text: string, place: string): Problem =>
  countProblem([badCell(text, 'file', () => place)!], 1);

export const raggedRecord = (length: number, width: number, place: string): Problem =>
  dataProblem({
    code: 'ragged-row',
    message: `this record has ${length} value${length === 1 ? '' : 's'} where the header has ${width}`,
    place,
    hint: 'every record needs the same number of values; put text that holds the separator in double quotes',
  });

export const missingValues = (
  used: RecordColumns,
  missing: number,
  records: number,
  firstText: string,
  place: string,
): Problem =>
  dataProblem({
    code: 'missing-values',
    message:
      `the value of ${namesOf(used)} is missing in ${missing} of ${records} ` +
      `record${records === 1 ? '' : 's'} (first ${firstText.trim() === '' ? 'an empty one' : shownValue(firstText.trim())})`,
    place,
    hint: 'add --missing drop to leave such records out, or --missing level to count missing as a level of its own',
  });

const namesOf = ({ rowsName, columnsName, strataName, clusterName }: RecordColumns): string => {
  const names = [rowsName, columnsName, strataName, clusterName].filter((name) => name !== null).map(named);
  return `${names.slice(0, -1).join(', ')} or ${names.at(-1)!}`;
};

export const missingKey = (place: string): Problem =>
  dataProblem({
    code: 'missing-key',
    message: 'a value that says which table this record belongs to is missing',
    place,
    hint: 'add --missing drop to leave such records out, or --missing level to make them tables of their own',
  });

export const missingFamily = (place: string): Problem =>
  dataProblem({
    code: 'missing-family',
    message: 'the value that names the family of this table is missing',
    place,
    hint: 'write the family into every record, or name another column with --family',
  });

/** A table is adjusted in one family. */
export const twoFamilies = (key: string, before: string, here: string, place: string): Problem =>
  dataProblem({
    code: 'two-families',
    message: `table ${shownValue(key)} has the family ${shownValue(here)} here and ${shownValue(before)} before`,
    place,
    hint: 'all records of a table need the same family; add the column to --by if these are two tables',
  });

const named = (name: string): string => shownValue(name).slice(1, -1);

/** Under a rule that keeps missing values as a level: of clusters there is no such level. */
export const missingCluster = (name: string, place: string): Problem =>
  dataProblem({
    code: 'missing-cluster',
    message: `the cluster (${named(name)}) of this record is missing, so what belongs together with it is not known`,
    place,
    hint: 'add --missing drop to leave such records out, or give each such unit a cluster of its own in the file',
  });

export const clusterInTwoRows = (
  cluster: string,
  rowsName: string,
  before: string,
  here: string,
  place: string,
): Problem =>
  dataProblem({
    code: 'cluster-in-two-groups',
    message: `cluster ${shownValue(cluster)} has ${named(rowsName)} ${shownValue(here)} here and ${shownValue(before)} before`,
    place,
    hint: 'a cluster is permuted whole, so all its records need the same row; check the record, or name the column of the groups with --rows',
  });

export const tooManyClusters = (name: string, most: number, place: string): Problem =>
  dataProblem({
    code: 'too-many-clusters',
    message: `column ${shownValue(name)} holds more than ${most} different values`,
    place,
    hint: 'leave --cluster out if every unit stands for itself',
  });

export const realMissingLevel = (place: string): Problem =>
  dataProblem({
    code: 'missing-level-name',
    message: `${shownValue(missingLevel)} is a value in the data, so missing values cannot become a level of that name`,
    place,
    hint: 'write that value in another way, or add --missing drop',
  });

export const tooManyLevels = (name: string, place: string): Problem =>
  dataProblem({
    code: 'too-many-levels',
    message: `column ${shownValue(name)} holds more than ${mostLevels} different values`,
    place,
    hint: 'name a column of categories; this one looks like identifiers or measurements',
  });

export const noRecords = (place: string): Problem =>
  dataProblem({
    code: 'only-header',
    message: 'there are no records below the header',
    place,
    hint: 'check that this is the right file, and that it was saved whole',
  });

export const noRecordsLeft = (records: number, place: string): Problem =>
  dataProblem({
    code: 'no-records-left',
    message: `a value is missing in every record (${records}), so none is left to count`,
    place,
    hint: 'check that the right columns were named, or add --missing level',
  });
