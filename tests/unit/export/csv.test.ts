import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { csvOf } from '@/lib/export/csv';

const cellsOf = (csv: string) => Papa.parse<string[]>(csv.slice(1), { skipEmptyLines: true }).data;

describe('a table as CSV', () => {
  it('is UTF-8 with a byte-order mark and ends every row with CR LF', () => {
    const csv = csvOf({ columns: ['a', 'b'], rows: [[1, 'é'], [null, 'x']] });
    expect(csv).toBe('\uFEFFa,b\r\n1,é\r\n,x\r\n');
    expect([...new TextEncoder().encode(csv).slice(0, 3)]).toEqual([0xef, 0xbb, 0xbf]);
  });

  it('keeps quotes, commas and lines within a cell', () => {
    const words = 'she said "dry", twice\r\nand wrote on';
    expect(cellsOf(csvOf({ columns: ['text'], rows: [[words]] }))).toEqual([['text'], [words]]);
  });

  it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '\r=1', '\n=1', '＝1+1', '=HYPERLINK("http://x.example","y")'])('lets no word begin like a formula: %j', (words) => {
    expect(cellsOf(csvOf({ columns: ['text'], rows: [[words]] }))[1]).toEqual([`'${words}`]);
  });

  it('leaves numbers alone, and words that only hold such a sign', () => {
    expect(csvOf({ columns: ['a', 'b', 'c'], rows: [[-1.5, 1e-21, 'half-dry = good']] })).toBe('\uFEFFa,b,c\r\n-1.5,1e-21,half-dry = good\r\n');
  });

  it('guards the heads too, and writes heads alone when there are no rows', () => {
    expect(csvOf({ columns: ['=a', 'b'], rows: [] })).toBe('\uFEFF"\'=a",b\r\n');
  });

  it('writes a double so that the same double is read back', () => {
    const values = [0.1 + 0.2, Math.PI, 5e-324, 123_456_789.123_456_78];
    expect(cellsOf(csvOf({ columns: ['v'], rows: values.map((value) => [value]) })).slice(1).map(([text]) => Number(text))).toEqual(values);
  });
});
