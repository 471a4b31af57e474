import { describe, expect, it } from 'vitest';
import { sha256 } from '../../unit/safety/fixtures';

// Source: FIPS 180-4 example values (NIST CSRC, "SHA256.pdf"): "abc" and the 448-bit message.
describe('SHA-256 port of the tests', () => {
  it.each([
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    [
      'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    ],
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
  ])('sha256 > FIPS 180-4 message %j > its digest', (message, digest) => {
    expect(sha256(message)).toBe(digest);
  });

  it('sha256 > a letter outside ASCII > hashed as UTF-8', () => {
    // coreutils: printf '\303\251' | sha256sum
    expect(sha256('\u00e9')).toBe('4a99557e4033c3539de2eb65472017cad5f9557f7a0625a09f1c3f6e2ba69c4c');
  });
});
