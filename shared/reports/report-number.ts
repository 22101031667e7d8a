/**
 * Report numbers: `TN-26-00042-3`. Two digits of the year (UTC), five digits (six once a year is
 * full) and one check character over the characters before it without hyphens, by ISO/IEC 7064
 * MOD 37,36.
 */

const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/** The check character of a string of 0-9 and A-Z (ISO/IEC 7064, hybrid system MOD 37,36). */
export function checkCharacter(text: string): string {
  let product = 36;
  for (const character of text) {
    const value = alphabet.indexOf(character);
    if (value < 0) throw new RangeError('check characters are over 0-9 and A-Z');
    const sum = (product + value) % 36 || 36;
    product = (sum * 2) % 37;
  }
  return alphabet[(37 - product) % 36] ?? '';
}

/** `serial`: 0 to 999,999. */
export function formatReportNumber(year: number, serial: number): string {
  const start = `TN-${String(year % 100).padStart(2, '0')}-${String(serial).padStart(5, '0')}`;
  return `${start}-${checkCharacter(start.replaceAll('-', ''))}`;
}

export type ReadReportNumber =
  | { readonly kind: 'number'; readonly number: string }
  | { readonly kind: 'mistyped' }
  | { readonly kind: 'other' };

/** Reads a number as people type it: any case, spaces or hyphens, O for 0 and I for 1. */
export function readReportNumber(text: string): ReadReportNumber {
  const typed = text.trim().toUpperCase().replace(/[\s\-–—._]+/g, '');
  const match = /^TN([0-9OI]{2})([0-9OI]{5,6})([0-9A-Z])$/.exec(typed);
  if (!match) return { kind: 'other' };
  const [, year = '', serial = '', check = ''] = match;
  const digits = (part: string): string => part.replaceAll('O', '0').replaceAll('I', '1');
  const start = `TN${digits(year)}${digits(serial)}`;
  if (checkCharacter(start) !== check) return { kind: 'mistyped' };
  return { kind: 'number', number: `TN-${digits(year)}-${digits(serial)}-${check}` };
}
