import { expect, test } from 'vitest';
import { canonicalJson } from '@/services/engine/record/canonical';
import { sha256Hex, utf8Of } from '@/services/engine/record/sha256';

// FIPS 180-4 example messages (NIST example values).
test.each([
  ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
  ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
  [
    'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
    '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
  ],
  ['a'.repeat(1_000_000), 'cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0'],
])('SHA-256 %#', (message, digest) => {
  expect(sha256Hex(utf8Of(message))).toBe(digest);
});

// RFC 8785 section 3.2.2 and 3.2.3 examples (from memory).
test('RFC 8785 examples', () => {
  expect(
    canonicalJson({
      numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      literals: [null, true, false],
    }),
  ).toBe('{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27]}');
  const keys = ['\u20ac', '\r', '\ufb33', '1', '\ud83d\ude00', '\u0080', '\u00f6'];
  const sorted = ['\r', '1', '\u0080', '\u00f6', '\u20ac', '\ud83d\ude00', '\ufb33'];
  const written = canonicalJson(Object.fromEntries(keys.map((key) => [key, 0])));
  expect(written).toBe(`{${sorted.map((key) => `${JSON.stringify(key)}:0`).join(',')}}`);
});

test.each([undefined, NaN, Infinity, '\ud800', { a: undefined }, new Date(0)])('refuses %s', (value) => {
  expect(() => canonicalJson(value)).toThrow(TypeError);
});
