/** A part of the results as Parquet: a fixed run of designs, every stored column in its machine unit. */
import { type ColumnSource, parquetWriteBuffer } from 'hyparquet-writer';
import { machineValues, type ResultColumn } from '../core/evaluate/result-columns.ts';

/** Designs per part, whatever the workers and tasks, so that the same study gives the same files. */
export const designsPerPart = 50_000;

/** Designs per row group: their columns are small enough for the garbage collector's quick road. */
const rowsPerGroup = 10_000;
/** One page a column and group: to look for the ends of pages would take as long as to write them. */
const wholeColumns = 0;

/** Name of part k, counted from 0. */
export function partName(part: number): string {
  return `part-${String(part).padStart(5, '0')}.parquet`;
}

/** Rows of one part, gathered batch by batch. */
export class PartRows {
  readonly numbers: Float64Array;
  readonly columns: readonly Float64Array[];
  readonly feasible: Uint8Array;
  count = 0;

  constructor(capacity: number, width: number) {
    this.numbers = new Float64Array(capacity);
    this.columns = Array.from({ length: width }, () => new Float64Array(capacity));
    this.feasible = new Uint8Array(capacity);
  }

  /** Appends designs first…first + count − 1 of a batch, from its row `from` on. */
  append(first: number, from: number, count: number, columns: readonly Float64Array[], feasible: Uint8Array): void {
    for (let i = 0; i < count; i++) this.numbers[this.count + i] = first + from + i;
    for (const [k, column] of columns.entries()) this.columns[k].set(column.subarray(from, from + count), this.count);
    this.feasible.set(feasible.subarray(from, from + count), this.count);
    this.count += count;
  }
}

/** The bytes of a part: number, the result columns (missing values null, options by name), feasible. */
export function partBytes(rows: PartRows, columns: readonly ResultColumn[]): Uint8Array {
  const { count } = rows;
  const columnData: ColumnSource[] = [
    { name: 'number', data: wholeNumbers(rows.numbers.subarray(0, count)), type: 'INT64', nullable: false, encoding: 'DELTA_BINARY_PACKED' },
    ...columns.map((column, k): ColumnSource => dataColumn(column, rows.columns[k].subarray(0, count))),
    { name: 'feasible', data: flags(rows.feasible.subarray(0, count)), type: 'BOOLEAN', nullable: false, statistics: false },
  ];
  return new Uint8Array(parquetWriteBuffer({ columnData, rowGroupSize: rowsPerGroup, pageSize: wholeColumns }));
}

function wholeNumbers(numbers: Float64Array): BigInt64Array {
  const whole = new BigInt64Array(numbers.length);
  for (let i = 0; i < numbers.length; i++) whole[i] = BigInt(numbers[i]);
  return whole;
}

function flags(values: Uint8Array): boolean[] {
  const set = new Array<boolean>(values.length);
  for (let i = 0; i < values.length; i++) set[i] = values[i] === 1;
  return set;
}

/** Inputs always exist. Numbers stand as they are: dictionaries cost more time than the room they save. */
function dataColumn(column: ResultColumn, values: Float64Array): ColumnSource {
  const { key: name, labels, role } = column;
  if (role === 'option') return { name, data: Array.from(values, (point) => labels?.[point] ?? null), type: 'STRING', nullable: true };
  const written = machineValues(column, values);
  const nullable = role === 'metric';
  const data = nullable && written.some(Number.isNaN) ? Array.from(written, (value) => (Number.isNaN(value) ? null : value)) : written;
  return { name, data, type: 'DOUBLE', nullable, encoding: 'PLAIN' };
}
