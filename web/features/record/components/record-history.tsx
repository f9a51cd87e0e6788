import type { History } from '../../../../shared/schemas/sheet.ts'
import { clockOf, dateText } from '../../../lib/time.ts'

/** What happened to the sheet, oldest first; nothing is ever taken out. */
export function RecordHistory({ history }: { history: readonly History[] }) {
  return (
    <section aria-labelledby="history" className="px-margin pt-3 pb-4">
      <h2 id="history" className="pb-1 text-2">
        History
      </h2>
      <ol className="border-t-[1.5px] border-ink">
        {history.map((line) => (
          <li
            key={`${line.at}|${line.action}|${line.text}`}
            className="grid grid-cols-[148px_1fr] gap-x-2 border-b border-feint py-0.5 max-sm:grid-cols-1"
          >
            <span className="figures text-[13.5px] font-normal">
              {dateText(line.at)} {clockOf(line.at)}
            </span>
            <span>
              <strong>{line.who}</strong> {line.text}
            </span>
          </li>
        ))}
      </ol>
    </section>
  )
}
