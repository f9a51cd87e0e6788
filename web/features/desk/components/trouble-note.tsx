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
  return (
    <Note>
      {trouble.message} What you typed is kept. Which stands?
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

const Note = ({ children }: { children: React.ReactNode }) => (
  <div role="alert" className="mb-2 border-l-[3px] border-ink bg-straw-pale py-1 pr-1 pl-2">
    {children}
  </div>
)
