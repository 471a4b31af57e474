import { describe, expect, it } from 'vitest';
import { newPasswordSchema } from '../../../shared/contracts/accounts';
import { isGuessable, wordsOf } from '../../../server/modules/accounts/password-rules';

const own = wordsOf('mara.quill@hall.example', 'Mara Quill', 'Lantern canopy', 'Weir Hall');

describe('newPasswordSchema (ASVS 5.0 6.2.1, 6.2.5, 6.2.9; NIST SP 800-63B-4 3.1.1.2)', () => {
  it.each([
    ['14 characters', 'x'.repeat(14), false],
    ['15 characters', 'x'.repeat(15), true],
    ['64 characters', 'x'.repeat(64), true],
    ['256 characters', 'x'.repeat(256), true],
    ['257 characters', 'x'.repeat(257), false],
    ['15 spaces between', 'a b c d e f g h', true],
    ['14 characters of two code units each', '\u{1F41D}'.repeat(14), false],
    ['15 characters of two code units each', '\u{1F41D}'.repeat(15), true],
    ['only figures, no capitals, no signs', '830174926583710', true],
    ['letters of another script', 'семь цапель над плотиной', true],
  ])('newPasswordSchema > %s > %s', (_what, password, allowed) => {
    expect(newPasswordSchema.safeParse(password).success).toBe(allowed);
  });
});

describe('isGuessable (ASVS 5.0 6.2.4, 6.2.11)', () => {
  it.each([
    'passwordpassword',
    'PasswordPassword1',
    'password password!',
    'password12345678',
    'qwertyqwertyqwerty',
    'qwerty123456789',
    '123456789987654321',
    'qwertyuiop12345',
    'aaaaaaaaaaaaaaaaaa',
    '!!!!!!!!!!!!!!!!',
    'abcabcabcabcabcabc',
    'abcdefghijklmnop',
    '9876543210987654',
    'strutbee-strutbee',
    'Strutbee Installation 2027',
    'maraquillmaraquill',
    'mara.quill@hall.example',
    'Quill Mara Strutbee',
    'lantern canopy weir hall',
    'dragondragondragon7',
  ])('isGuessable > %s > yes', (password) => {
    expect(password.length).toBeGreaterThanOrEqual(15);
    expect(isGuessable(password, own)).toBe(true);
  });

  it.each([
    'correct horse battery staple',
    'seven herons over the weir',
    'my dragon eats plywood',
    'k3 Vq-81 zzT 0p4w',
    '8301749265837104',
    'семь цапель над плотиной',
    '🐝 hums along the strut 🐝',
    'the lantern sings off key',
  ])('isGuessable > %s > no', (password) => {
    expect(isGuessable(password, own)).toBe(false);
  });

  it('isGuessable > 512 code units > answered within a second', () => {
    const started = performance.now();
    isGuessable('password1qwerty'.repeat(34), own);
    expect(performance.now() - started).toBeLessThan(1000);
  });
});
