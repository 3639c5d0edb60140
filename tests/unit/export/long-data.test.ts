import { describe, expect, it } from 'vitest';
import { answersTable, glassesTable, longRows, type ExportFacts } from '@/lib/export/long-data';
import { countAnswers, type OperationFact } from '@/lib/results/evidence';

const op = (seatId: string, seq: number, more: Partial<OperationFact>): OperationFact => ({
  seatId, tokenGeneration: 1, seq, receiptNo: seq, kind: 'score', block: 1, position: 1, item: null, number: null, text: null, isGuess: null, isLate: false, ...more,
});

const seat = (id: string, number: number, isClaimed = true) =>
  ({ id, number, isReserve: false, isClaimed, isSubmitted: true, hasLeft: false, role: 'taste' as const, name: isClaimed ? `Guest ${number}` : null });

const factsOf = (operations: OperationFact[]): ExportFacts => ({
  answers: countAnswers(operations),
  seats: [seat('b', 2), seat('a', 1), seat('c', 3, false)],
  glasses: ['a', 'b', 'c'].flatMap((seatId) => [1, 2].map((position) => ({ seatId, block: 1, position, code: seatId === 'a' ? `01${position}` : `50${position}`, sample: 3 - position }))),
  items: [{ item: 1, name: 'Length', phase: 'after', kind: 'line' }, { item: 2, name: 'Mousy', phase: 'nose', kind: 'flag' }],
  samples: [{ sample: 1, label: 'Barrel 12' }, { sample: 2, label: 'Barrel 31' }],
});

describe('answers in the long form', () => {
  it('are one row each, by seat, block, place and kind, with code and sample', () => {
    const rows = longRows(factsOf([
      op('b', 1, { item: 1, number: 40 }),
      op('a', 1, { position: 2, item: 1, number: 70 }),
      op('a', 2, { kind: 'comment', text: ' plums \n' }),
      op('a', 3, { kind: 'fault', item: 2, number: 1 }),
      op('a', 4, { item: 1, number: 60 }),
    ]));
    expect(rows.map(({ seat: number, position, kind, value, text }) => [number, position, kind, value, text])).toEqual([
      [1, 1, 'score', 60, null], [1, 1, 'fault', 1, null], [1, 1, 'comment', null, 'plums'], [1, 2, 'score', 70, null], [2, 1, 'score', 40, null],
    ]);
    expect(rows[0]).toMatchObject({ code: '011', sample: 2, sampleLabel: 'Barrel 31', item: 1, itemName: 'Length', phase: 'after', guess: null, position2: null });
  });

  it('hold only what counts: not what was late, replaced, taken back, or a fault that was unticked', () => {
    const rows = longRows(factsOf([
      op('a', 1, { item: 1, number: 10 }), op('a', 2, { item: 1, number: 20 }), op('a', 3, { item: 1, number: 99, isLate: true }),
      op('b', 1, { item: 1, number: 30 }), op('b', 2, { kind: 'clear', item: 1 }),
      op('b', 3, { kind: 'fault', item: 2, number: 0 }), op('b', 4, { kind: 'comment', text: '  ' }), op('b', 5, { kind: 'submit', block: null, position: null }),
    ]));
    expect(rows.map((row) => row.value)).toEqual([20]);
  });

  it('say which glasses were chosen and whether by guessing, and an order by its places', () => {
    const rows = longRows(factsOf([op('a', 1, { kind: 'choice', position: 2, number: 1, isGuess: true }), op('b', 1, { kind: 'choice', isGuess: false }), op('b', 2, { kind: 'order', position: null, text: '2,1' })]));
    expect(rows[0]).toMatchObject({ kind: 'choice', position: 2, position2: 1, guess: true, value: null, sample: 1 });
    expect(rows.map((row) => [row.kind, row.guess, row.text])).toEqual([['choice', true, null], ['order', null, '2 1'], ['choice', false, null]]);
    const table = answersTable(rows);
    expect(table.rows.map((row) => row[table.columns.indexOf('guess')])).toEqual(['yes', null, 'no']);
  });

  it('name nobody unless names are asked for', () => {
    const rows = longRows(factsOf([op('a', 1, { item: 1, number: 10 })]));
    expect(JSON.stringify(answersTable(rows))).not.toMatch(/Guest|"name"/);
    const named = answersTable(rows, { withNames: true });
    expect(named.columns.slice(0, 2)).toEqual(['seat', 'name']);
    expect(named.rows[0]!.slice(0, 2)).toEqual([1, 'Guest 1']);
    expect(named.rows[0]).toHaveLength(named.columns.length);
  });

  it('come with every glass of the taken seats, in order', () => {
    const { rows } = glassesTable(factsOf([]));
    expect(rows.map((row) => row.slice(0, 5))).toEqual([[1, 1, 1, '011', 2], [1, 1, 2, '012', 1], [2, 1, 1, '501', 2], [2, 1, 2, '502', 1]]);
  });
});
