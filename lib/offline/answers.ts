import type { Operation } from '../ballots/schema';
import type { SheetAnswers } from '../ballots/types';
import type { OutboxRow } from './types';

/** Three states, never merged: on this phone, sent, received. `saving` is the moment before the first. */
export type KeptState = 'saving' | 'on-phone' | 'sent' | 'received' | 'late' | 'refused';

export interface Answer {
  op: Operation['body'] | null;
  state: KeptState;
}

/** What an answer speaks of. */
export const scoreKey = (block: number, position: number, item: number) => `${block}/${position}/line/${item}`;
export const faultKey = (block: number, position: number, item: number) => `${block}/${position}/fault/${item}`;
export const commentKey = (block: number, position: number) => `${block}/${position}/comment`;
export const orderKey = (block: number) => `${block}/order`;
export const choiceKey = (block: number) => `${block}/choice`;

function keyOf(body: Operation['body']): string {
  switch (body.kind) {
    case 'score':
    case 'clear':
      return scoreKey(body.block, body.position, body.item);
    case 'fault':
      return faultKey(body.block, body.position, body.item);
    case 'comment':
      return commentKey(body.block, body.position);
    case 'choice':
      return choiceKey(body.block);
    case 'order':
      return orderKey(body.block);
    case 'submit':
      return 'submit';
  }
}

const stateOf = (row: OutboxRow): KeptState => {
  if (row.state === 'refused') return 'refused';
  if (row.state === 'received') return row.isLate ? 'late' : 'received';
  return 'on-phone';
};

/** The answers that the server already had when the sheet was loaded. */
function fromServer(answers: SheetAnswers): Map<string, Answer> {
  const known = new Map<string, Answer>();
  const add = (op: Operation['body']) => known.set(keyOf(op), { op, state: 'received' });
  for (const score of answers.scores) add({ kind: 'score', ...score });
  for (const fault of answers.faults) add({ kind: 'fault', ...fault, isNoted: true });
  for (const choice of answers.choices) add({ kind: 'choice', ...choice });
  for (const order of answers.orders) add({ kind: 'order', ...order });
  for (const comment of answers.comments) add({ kind: 'comment', ...comment });
  return known;
}

/**
 * The answers as they stand: the server's, then the phone's own operations by their count. A
 * refused operation changes nothing (the refusal is shown apart); a choice that stands is final.
 */
export function standing(server: SheetAnswers, rows: readonly OutboxRow[]): Map<string, Answer> {
  const answers = fromServer(server);
  for (const row of [...rows].sort((a, b) => a.op.seq - b.op.seq)) {
    if (row.state === 'refused') continue;
    const key = keyOf(row.op.body);
    if (row.op.body.kind === 'choice' && answers.has(key) && answers.get(key)!.op !== row.op.body && row.state !== 'received') continue;
    answers.set(key, { op: row.op.body, state: stateOf(row) });
  }
  return answers;
}
