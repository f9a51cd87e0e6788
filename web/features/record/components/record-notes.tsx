import type { Layout } from '../../../../shared/layouts/layout.ts'
import type { TrialRecord } from '../../../../shared/schemas/record.ts'

/** What the rules noted, and what a person let stand, with the reason. */
export function RecordNotes({ record, layout }: { record: TrialRecord; layout: Layout }) {
  if (record.notes.length === 0) return null
  const labels = new Map(layout.cells.map((c) => [c.key, c.label]))
  return (
    <section aria-labelledby="notes" className="px-margin pt-3">
      <h2 id="notes" className="pb-1 text-2">
        What the rules noted
      </h2>
      <ul className="border-t-[1.5px] border-ink">
        {record.notes.map((note) => (
          <li key={note.id} className="border-b border-feint py-0.5">
            {note.text}
            {note.settledBy && (
              <span className="text-pen">
                {' '}
                {note.settledBy} let it stand{note.why ? `: “${note.why}”` : ''}.
              </span>
            )}
            <span className="label block">
              {[note.cells.map((key) => labels.get(key) ?? key).join(', '), `rule ${note.rule}`].filter(Boolean).join('; ')}
            </span>
          </li>
        ))}
      </ul>
    </section>
  )
}
