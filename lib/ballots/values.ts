import type { OperationBody } from './schema';

function numberOf(body: OperationBody): number | null {
  switch (body.kind) {
    case 'score':
      return body.value;
    case 'fault':
      return Number(body.isNoted);
    case 'choice':
      return body.also ?? null;
    default:
      return null;
  }
}

/** Where each part of an answer stands in a row of `operations`. An order's places are text: "2,1,3". */
export const valuesOf = (body: OperationBody) => ({
  block: 'block' in body ? body.block : null,
  position: 'position' in body ? body.position : null,
  item: 'item' in body ? body.item : null,
  valueNumber: numberOf(body),
  valueText: body.kind === 'comment' ? body.text : body.kind === 'order' ? body.order.join(',') : null,
  isGuess: body.kind === 'choice' ? body.isGuess : null,
});

/** The places of an order as they are kept, from least to most. */
export const placesOf = (text: string): number[] => (text === '' ? [] : text.split(',').map(Number));
