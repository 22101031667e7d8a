/** Something the person at the keyboard can understand and mend: shown without a stack. */
export class PlainError extends Error {}
