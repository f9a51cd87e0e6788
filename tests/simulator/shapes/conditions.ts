/** Every condition that the reader is tried under besides the three levels of the standard set. */
import type { Condition } from './condition.ts'
import { HAND_CONDITIONS } from './hand-conditions.ts'
import { HOPELESS_CONDITIONS } from './hopeless-conditions.ts'
import { LIGHT_CONDITIONS } from './light-conditions.ts'
import { PAPER_CONDITIONS } from './paper-conditions.ts'
import { PRINT_CONDITIONS } from './print-conditions.ts'

export const CONDITIONS: readonly Condition[] = [
  ...PAPER_CONDITIONS,
  ...LIGHT_CONDITIONS,
  ...PRINT_CONDITIONS,
  ...HAND_CONDITIONS,
  ...HOPELESS_CONDITIONS,
]
