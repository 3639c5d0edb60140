import type { Draw } from './types';

/** A code made only of these digits reads as another code (or itself) upside down on a glass. */
const TURNS_OVER = /^[01689]+$/;

/** All three-digit codes that may stand on a glass. */
export const ALL_CODES: readonly string[] = Array.from({ length: 900 }, (_, i) => String(100 + i)).filter((code) => !TURNS_OVER.test(code));

/**
 * Draws `count` different codes, each equally likely.
 * @throws RangeError when more are asked for than there are (`ALL_CODES.length`)
 */
export function drawCodes(count: number, draw: Draw): string[] {
  if (count > ALL_CODES.length) throw new RangeError(`there are only ${ALL_CODES.length} codes`);
  const left = [...ALL_CODES];
  const drawn: string[] = [];
  for (let i = 0; i < count; i += 1) {
    const at = draw(left.length);
    drawn.push(left[at]!);
    left[at] = left[left.length - 1]!;
    left.pop();
  }
  return drawn;
}
