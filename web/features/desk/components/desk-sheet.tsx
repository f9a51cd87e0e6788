import { type ReactNode, useRef } from 'react'
import type { Layout } from '../../../../shared/layouts/layout.ts'
import type { Entered, Sheet } from '../../../../shared/schemas/sheet.ts'
import type { User } from '../../../../shared/schemas/user.ts'
import { useKeys } from '../../../lib/use-keys.ts'
import { Foot } from '../../../ui/foot.tsx'
import { useEnter, useSendBack, useSetAside } from '../desk.queries.ts'
import { deskFootKeys, deskKeyMap } from '../desk-keys.ts'
import { judgeWith } from '../model/desk-view.ts'
import { stripOf } from '../model/strip.ts'
import { typedValue } from '../model/typed-value.ts'
import { useAlignedRow } from '../use-aligned-row.ts'
import { useDesk } from '../use-desk.ts'
import { type DeskActs, useDeskActs } from '../use-desk-acts.ts'
import { useHold } from '../use-hold.ts'
import { DeskStrip } from './desk-strip.tsx'
import { Margin } from './margin.tsx'
import { PagePane, rowInHand } from './page-pane.tsx'
import { ResultsStrip } from './results-strip.tsx'

interface DeskSheetProps {
  sheet: Sheet
  layout: Layout
  me: User
  back: ReactNode
  /** Where to go when the sheet leaves the desk: to the next one, or to the list. */
  onLeave: (next: string | null) => void
  /** It stands in the trial book; `next` is the sheet the server names. */
  onEntered: (entered: Entered) => void
  /** What was done just before, in words. */
  starts: string | null
  /** The next sheet that waits and is free, for when this one is not. */
  next: string | null
}

/** One sheet at the desk. Made for a keyboard and a wide screen; on a narrow one the margin comes first. */
export function DeskSheet({ sheet, layout, me, back, onLeave, onEntered, starts, next }: DeskSheetProps) {
  const held = useHold(sheet, me.id)
  const desk = useDesk(sheet, layout, me.name, held !== null)
  const acts = useDeskActs(desk, starts)
  const crop = useRef<HTMLElement>(null)
  const pane = useRef<HTMLElement>(null)
  useAlignedRow({ pane, crop, share: rowInHand(desk) })
  const [sendBack, setAside, enter] = [useSendBack(sheet.id), useSetAside(sheet.id), useEnter(sheet.id)]
  const { version } = desk.sheet

  const leave = { onSuccess: () => onLeave(null), onError: (error: Error) => acts.say(error.message) }
  const enterIt = (answer = '') =>
    enter.mutate({ version, answer }, { onSuccess: onEntered, onError: (error) => acts.say(error.message) })
  const entering = () => {
    const reason = acts.notYet()
    if (reason) acts.say(reason)
    else if (desk.sheet.state === 'challenged') acts.setMode({ kind: 'answer' })
    else enterIt()
  }
  const whole = { entering, leave: () => onLeave(null), next: next ? () => onLeave(next) : null }
  useKeys(deskKeyMap(desk, acts, whole))

  // A sheet with several pictures shows the one that holds the ink of the cell in hand.
  const page = sheet.pages.find((p) => p.flattened && p.id === acts.reading?.pageId) ?? sheet.pages.find((p) => p.flattened)
  const picture = page ? `/api/pages/${page.id}/picture` : null
  const figures = stripOf(desk.view.results, desk.items)
  return (
    <div className="flex grow flex-col lg:h-[calc(100dvh-44px)] lg:min-h-[560px] lg:grow-0">
      <DeskStrip desk={desk} held={held} back={back} />
      <main
        id="work"
        tabIndex={-1}
        className="grid min-h-0 grow lg:grid-cols-[minmax(0,1fr)_minmax(380px,30%)] lg:grid-rows-[minmax(0,1fr)]"
      >
        <PagePane desk={desk} picture={picture} pane={pane} />
        <div className="min-h-0 max-lg:order-first lg:flex lg:flex-col">
          <Margin
            desk={desk}
            held={held}
            acts={acts}
            picture={picture}
            crop={crop}
            onSendBack={(reason) => sendBack.mutate({ version, reason, cells: [...(desk.item?.cells ?? [])] }, leave)}
            onAnswer={enterIt}
            onSetAside={(reason) => setAside.mutate({ version, reason }, leave)}
          />
        </div>
      </main>
      <ResultsStrip figures={figures} other={otherFigures(desk, acts)} />
      <Foot keys={deskFootKeys(desk, acts, whole)} />
    </div>
  )
}

/** What the value being typed, or the second of what may be taken, would make of the results. */
function otherFigures(desk: ReturnType<typeof useDesk>, acts: DeskActs) {
  const { cell, reading, proposal, mode } = acts
  if (!cell || !reading) return null
  const typed = mode.kind === 'type' ? typedValue(cell, mode.text, desk.view.values) : null
  const other =
    typed && typed.problem === null
      ? typed.value
      : mode.kind === 'why'
        ? mode.value
        : proposal?.offers.find((offer) => offer.value !== reading.value && offer.byInk !== null)?.value
  if (other === undefined) return null
  return { words: String(other), figures: stripOf(judgeWith(desk.view, desk.layout, cell.key, other).results, desk.items) }
}
