import { expect, test } from 'vitest'
import { sha256, sha256Plain } from './sha256.ts'

// Source: FIPS 180-2 appendix B (B.1 one block, B.2 two blocks, B.3 a million times "a").
const PUBLISHED = [
  ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
  [
    'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
    '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
  ],
  ['a'.repeat(1_000_000), 'cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0'],
] as const

test.each(PUBLISHED)('the published digest of a text comes out (%#)', async (text, digest) => {
  const bytes = new TextEncoder().encode(text)
  expect(sha256Plain(bytes)).toBe(digest)
  expect(await sha256(bytes.slice().buffer)).toBe(digest)
})
