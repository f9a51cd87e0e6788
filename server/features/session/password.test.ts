import { describe, expect, it } from 'vitest'
import { hashPassword, verifyPassword } from './password.ts'

describe('a password', () => {
  it('is kept as argon2id with 19 MiB, two passes and one lane', async () => {
    // OWASP Password Storage sheet: argon2id, m = 19 MiB (19456 KiB), t = 2, p = 1; salted, so twice the same gives two hashes.
    const [first, second] = [await hashPassword('wet clay sticks to boots'), await hashPassword('wet clay sticks to boots')]
    expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
    expect(second).not.toBe(first)
  })

  it('is recognised, and no other is; without a hash none is', async () => {
    const kept = await hashPassword('wet clay sticks to boots')
    expect(await verifyPassword(kept, 'wet clay sticks to boots')).toBe(true)
    expect(await verifyPassword(kept, 'wet clay sticks to boot')).toBe(false)
    expect(await verifyPassword(null, 'nobody signs in with this')).toBe(false)
  })
})
