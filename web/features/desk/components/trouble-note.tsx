import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { counted } from '../../../lib/words.ts'
import { Button } from '../../../ui/button.tsx'
import type { Desk } from '../use-desk.ts'

/** What could not be saved, what was kept, and what to do. */
export function TroubleNote({ desk }: { desk: Desk }) {
  const { trouble, ops } = desk.saved
  if (!trouble) return null
  if (trouble.kind === 'line') {
    return <Note>Not saved yet: {counted(ops.length, 'cell')}. They are kept here and go when the line is back.</Note>
  }
  if (trouble.kind === 'refused') return <Note>{trouble.message}</Note>
  const mine = mineIn(desk)
  return (
    <Note>
      {trouble.message} Yours is kept{mine && <>: {mine}</>}. Which stands?
      {trouble.issues.length > 1 && (
        <ul>
          {trouble.issues.map((issue) => (
            <li key={issue.path + issue.message}>{issue.message}</li>
          ))}
        </ul>
      )}
      <span className="mt-1 flex gap-3">
        <Button look="word" onClick={desk.saver.insist}>
          Mine stands
        </Button>
        <Button look="word" onClick={desk.saver.yieldTo}>
          Theirs stands
        </Button>
      </span>
    </Note>
  )
}

/** What the refused write was to make of its cell. */
function mineIn({ saved, layout }: Desk): string | null {
  const [op] = saved.ops
  if (op?.kind !== 'settle') return null
  const cell = layout.cells.find((c) => c.key === op.key)
  const value = op.how === 'kept' || op.how === 'corrected' ? formatValue(cell, op.value) : op.how
  return `${cell?.label ?? op.key} ${value}`
}

const Note = ({ children }: { children: React.ReactNode }) => (
  <div role="alert" className="mb-2 border-l-[3px] border-ink bg-straw-pale py-1 pr-1 pl-2">
    {children}
  </div>
)
