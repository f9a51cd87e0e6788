/** The trail's column of acts: what was done, in the words of the desk. Lines of older versions keep their short verbs. */

const ACTIONS: Record<string, string> = {
  add: 'added',
  blank: 'blanked',
  'blank on purpose': 'settled, blank on purpose',
  change: 'changed',
  corrected: 'settled, corrected',
  invite: 'invited',
  kept: 'settled, kept',
  'let stand': 'settled, let stand',
  plan: 'planned',
  'send in': 'arrived',
  'send link': 'link sent',
  'set password': 'password set',
  'sign in': 'signed in',
  'withdraw consent': 'consent withdrawn',
}
const SUBJECTS: Record<string, string> = { user: 'person', upload: 'file' }

/** "sheet: settled, kept" */
export const actWords = ({ action, subject }: { action: string; subject: string }): string =>
  `${SUBJECTS[subject] ?? subject}: ${ACTIONS[action] ?? action}`
