/** A long password can still be one that everybody tries: a common word over and over, a row of keys, one's own address. */
import { ZxcvbnFactory } from '@zxcvbn-ts/core'
import { UserError } from '../../../shared/errors.ts'

/** Bases of the passwords that guessing starts with; repeats, rows, dates and swapped characters are found without a list. */
const COMMON = [
  ...['password', 'passwort', 'passphrase', 'pass', 'secret', 'letmein', 'welcome', 'login', 'admin', 'administrator', 'user'],
  ...['qwerty', 'qwertyuiop', 'asdfghjkl', 'zxcvbnm', 'qwertz', 'azerty', '1q2w3e4r', '1qaz2wsx', 'qazwsx', 'abc123', '123456'],
  ...['iloveyou', 'love', 'monkey', 'dragon', 'master', 'sunshine', 'princess', 'football', 'baseball', 'shadow', 'superman'],
  ...['spring', 'summer', 'autumn', 'winter', 'january', 'changeme', 'default', 'test', 'guest', 'root', 'hello', 'computer'],
  ...['sheafbook', 'sheaf', 'tractor', 'tillage', 'plough', 'diesel', 'field', 'trial', 'farmer', 'correct', 'horse'],
]

/** Ten thousand million tries: more than the sign-in lets anybody make in a lifetime, few enough to allow any sentence. */
const MIN_GUESSES_LOG10 = 10

let judge: ZxcvbnFactory | undefined

/** @throws UserError `invalid` when it would be guessed early; `own` holds the person's name and address */
export function checkStrength(password: string, own: readonly string[]): void {
  judge ??= new ZxcvbnFactory({ dictionary: { common: COMMON } })
  if (judge.check(password, [...own]).guessesLog10 >= MIN_GUESSES_LOG10) return
  const message =
    'This password is guessed early: it repeats itself, or is one that many people use. A sentence of your own does well.'
  throw new UserError('invalid', message, { issues: [{ path: 'password', message }] })
}
