import type { ReactNode } from 'react'
import { formatSheetCode } from '../../../../shared/layouts/sheet-code.ts'
import { clockOf } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { Tally } from '../../../ui/tally.tsx'
import type { Desk } from '../use-desk.ts'

/** The strip over the sheet: which one it is, how far its doubts are, and whether all is saved. */
export function DeskStrip({ desk, held, back }: { desk: Desk; held: string | null; back: ReactNode }) {
  const { sheet } = desk
  const { settled, open } = desk.count
  const what = [sheet.tractor, sheet.implement].filter(Boolean).join(', ')
  const where = [sheet.place, sheet.runNumber ? `run ${sheet.runNumber}` : null].filter(Boolean).join(', ')
  return (
    <section
      aria-label="This sheet"
      className="flex flex-wrap items-center gap-x-3 border-b border-line bg-board px-margin py-0.5"
    >
      {back}
      <span className="figures font-[700]">{sheet.code ? formatSheetCode(sheet.code) : 'without a code'}</span>
      {what && <span>{what}</span>}
      {where && <span>{where}</span>}
      {sheet.demonstrator && <span>from {sheet.demonstrator}</span>}
      <span className="ml-auto flex flex-wrap items-center gap-x-3">
        <span>{held ? 'only to look at' : 'in your hand'}</span>
        <Tally settled={settled} waiting={open} inHand={open > 0} />
        <span>
          <strong className="figures">{settled}</strong> settled <strong className="figures">{open}</strong> wait
        </span>
        <span role="status" className="w-[126px] text-right">
          <Saved desk={desk} />
        </span>
      </span>
    </section>
  )
}

function Saved({ desk }: { desk: Desk }) {
  const { ops, savedAt, trouble } = desk.saved
  if (ops.length > 0) return trouble ? `not saved: ${counted(ops.length, 'cell')}` : 'saving'
  return savedAt ? `all saved ${clockOf(savedAt)}` : ''
}
