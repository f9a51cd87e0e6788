import type { Sheet } from '../../../../shared/schemas/sheet.ts'
import { momentText } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'

/** What happened to the sheet, folded away under the doubts. */
export function SheetHistory({ history }: { history: Sheet['history'] }) {
  if (history.length === 0) return null
  return (
    <details className="mt-2">
      <summary className="min-h-[30px] font-[650]">History, {counted(history.length, 'line')}</summary>
      <ol className="border-t-[1.5px] border-ink">
        {history.map((line) => (
          <li key={line.at + line.text} className="border-b border-feint py-0.5 text-[14px] leading-[20px]">
            <span className="figures text-graphite">{momentText(line.at)}</span> {line.who}: {line.text}
          </li>
        ))}
      </ol>
    </details>
  )
}
