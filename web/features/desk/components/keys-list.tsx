import { useState } from 'react'
import { letterKeysOn, switchLetterKeys } from '../../../lib/letter-keys.ts'
import { Button } from '../../../ui/button.tsx'
import { KeyCap } from '../../../ui/foot.tsx'

const KEYS: ReadonlyArray<[string, string]> = [
  ['Enter', 'settle as proposed, go to the next doubt'],
  ['1 to 9', 'take that value; at a doubt of a rule, take that cell in hand'],
  ['F2', 'type another value; so does a digit that names no value'],
  ['u', 'mark as unreadable'],
  ['b', 'blank on purpose'],
  ['k', 'keep as read; let a doubt of a rule stand, with the reason'],
  ['↓ ↑', 'next doubt, doubt before'],
  ['/', 'find any cell of the sheet'],
  ['s', 'send back to the demonstrator'],
  ['a', 'set aside'],
  ['Shift Enter', 'enter the sheet, take the next one'],
  ['Ctrl z', 'take back the last act'],
  ['Escape', 'leave what was begun; then back to the list'],
]

/** All keys, and the switch for single letters. */
export function KeysList({ onDone }: { onDone: () => void }) {
  const [on, setOn] = useState(letterKeysOn)
  return (
    <section aria-label="All keys" className="py-1">
      <dl className="grid grid-cols-[auto_1fr] gap-x-2 gap-y-0.5">
        {KEYS.map(([keys, does]) => (
          <div key={keys} className="contents">
            <dt>
              <KeyCap>{keys}</KeyCap>
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <label className="mt-1 flex min-h-[30px] items-center gap-1">
        <input
          type="checkbox"
          checked={on}
          onChange={(event) => {
            switchLetterKeys(event.target.checked)
            setOn(event.target.checked)
          }}
          className="h-[18px] w-[18px] accent-ink"
        />
        single letters work as keys
      </label>
      <Button look="word" onClick={onDone}>
        Back to the doubt
      </Button>
    </section>
  )
}
