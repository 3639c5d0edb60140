/** One line for the person at the terminal. */
export const say = (line = '') => process.stdout.write(`${line}\n`);

/**
 * Says why it can't go on, and ends.
 * @param {string} message
 * @returns {never}
 */
export function fail(message) {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}
