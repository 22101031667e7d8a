import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { passwordProblem, utf8Length } from './password-rules';

describe('passwordProblem', () => {
  it.each(['', 'short', 'elevenchars'])('refuses %j as too short', (password) => {
    expect(passwordProblem(password)).toBe('password_too_short');
  });

  it('counts characters, not UTF-16 units', () => {
    expect(passwordProblem('🪙'.repeat(6))).toBe('password_too_short');
  });

  it('takes 72 bytes and refuses 73, since bcrypt would cut them', () => {
    const base = 'slate and streak beside the needle, a stone of black basalt, wet by rain';
    expect(utf8Length(base)).toBe(72);
    expect(passwordProblem(base)).toBeNull();
    expect(passwordProblem(`${base}.`)).toBe('password_too_long');
    expect(passwordProblem('ü'.repeat(20) + 'quarzitstein und Feingold')).toBeNull();
    expect(passwordProblem('ü'.repeat(25) + 'quarzitstein und Feingold')).toBe(
      'password_too_long');
  });

  it.each(['passwordpassword', 'Password1234', 'P@ssw0rd12345', '123456789012', '000000000000',
    'abcdefghijkl', 'lkjihgfedcba', 'qwertyuiop[]', 'qwertyuiopasdf', 'abcabcabcabc',
    'CorrectHorseBatteryStaple', 'touchneedle1', '!!!welcome!!!2026', '2026-12-01-2026',
    '1qaz2wsx3edc'])('refuses %j as common', (password) => {
    expect(passwordProblem(password)).toBe('password_too_common');
  });

  it.each(['verdigris under glass', 'three crows on a wire', 'K7-mauve-anvil', 'ein Schluck Tee!',
    '試金石と銅の針で確かめる夜'])('takes %j', (password) => {
    expect(passwordProblem(password)).toBeNull();
  });

  it('measures UTF-8 as an encoder does', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), (text) => {
      const encoded = encodeURIComponent(text).replace(/%[0-9A-F]{2}/g, 'x').length;
      expect(utf8Length(text)).toBe(encoded);
    }));
  });
});
