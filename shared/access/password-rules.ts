import { commonPasswords, commonWords } from './common-passwords';

export const passwordMinimumCharacters = 12;
/** bcrypt reads no further than 72 bytes: a longer one is refused, never cut. */
export const passwordMaximumBytes = 72;

export const passwordProblems = ['password_too_short', 'password_too_long',
  'password_too_common'] as const;
export type PasswordProblem = (typeof passwordProblems)[number];

const runs = ['abcdefghijklmnopqrstuvwxyz', '01234567890123456789', 'qwertyuiopasdfghjklzxcvbnm',
  'qwertzuiopasdfghjklyxcvbnm', 'azertyuiopqsdfghjklmwxcvbn'];
const longestRepeatedUnit = 4;
const standIns: Readonly<Record<string, string>> = {
  '@': 'a', '4': 'a', '3': 'e', '1': 'i', '!': 'i', '0': 'o', $: 's', '5': 's', '7': 't' };

/**
 * What is wrong with a new password, or null. Characters are counted as code points, length in
 * UTF-8 bytes. Common means: on the list of well-known ones, a short unit repeated, a run along
 * the alphabet, the digits or a keyboard row, or a common word with digits and marks round it.
 */
export function passwordProblem(password: string): PasswordProblem | null {
  if ([...password].length < passwordMinimumCharacters) return 'password_too_short';
  if (utf8Length(password) > passwordMaximumBytes) return 'password_too_long';
  return isCommon(password.toLowerCase()) ? 'password_too_common' : null;
}

/** Bytes of the text in UTF-8; a lone surrogate counts as the three bytes that replace it. */
export function utf8Length(text: string): number {
  let bytes = 0;
  for (const character of text) {
    const point = character.codePointAt(0) ?? 0;
    bytes += point < 0x80 ? 1 : point < 0x800 ? 2 : point < 0x10000 ? 3 : 4;
  }
  return bytes;
}

function isCommon(lower: string): boolean {
  return commonPasswords.has(lower) || isRepeatedUnit(lower) || isRun(lower)
    || isDressedWord(lower);
}

function isRepeatedUnit(text: string): boolean {
  for (let size = 1; size <= longestRepeatedUnit; size += 1) {
    const unit = text.slice(0, size);
    if (unit.repeat(Math.ceil(text.length / size)).slice(0, text.length) === text) return true;
  }
  return false;
}

function isRun(text: string): boolean {
  const backwards = [...text].reverse().join('');
  return runs.some((run) => run.includes(text) || run.includes(backwards));
}

function isDressedWord(text: string): boolean {
  // Digits round the word are taken off before and after stand-ins are read as letters, since
  // the 1 of `passw0rd1` is dress but its 0 is a letter.
  const bare = withoutDress(text);
  return bare === '' || [bare, readStandIns(bare), withoutDress(readStandIns(text))]
    .some(isWordOrItsRepetition);
}

function withoutDress(text: string): string {
  return text.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');
}

function readStandIns(text: string): string {
  return [...text].map((each) => standIns[each] ?? each).join('');
}

function isWordOrItsRepetition(text: string): boolean {
  for (let times = 1; times <= 3; times += 1) {
    if (text.length % times !== 0) continue;
    const word = text.slice(0, text.length / times);
    if (commonWords.has(word) && word.repeat(times) === text) return true;
  }
  return false;
}
