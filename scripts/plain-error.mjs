/** Something the person at the keyboard can understand and mend: shown without a stack. */
export class PlainError extends Error {}

/**
 * Ends the process with the sentence, or with the stack where nobody foresaw it.
 * @param {unknown} error
 */
export function exitWith(error) {
  if (error instanceof PlainError) console.error(`\n${error.message}\n`);
  else console.error(error);
  process.exit(1);
}
