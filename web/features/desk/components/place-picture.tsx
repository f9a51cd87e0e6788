import { type ReactNode, useState } from 'react'
import { LAYOUTS } from '../../../../shared/layouts/registry.ts'
import type { PlaceSheet, Sheet } from '../../../../shared/schemas/sheet.ts'
import { useKeys } from '../../../lib/use-keys.ts'
import { Button } from '../../../ui/button.tsx'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import type { FootKey } from '../../../ui/foot.tsx'
import { Page } from '../../../ui/page.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { type Corner, CornerPicker } from './corner-picker.tsx'
import { ReasonForm } from './reason-form.tsx'

/** What was set on a picture; kept by the page, so that it still stands when the reading by it failed. */
export interface Placed {
  corners: readonly Corner[]
  /** They were read by, and have not been moved since. */
  tried: boolean
}

interface PlacePictureProps {
  sheet: Sheet
  name: string
  aside: ReactNode
  placed: Placed
  onPlaced: (placed: Placed) => void
  busy: boolean
  error: Error | null
  onPlace: (input: PlaceSheet) => void
  onSendBack: (reason: string) => void
  onSetAside: (reason: string) => void
  onLeave: () => void
}

/** A picture the reader could not place: set the sheet's four corners and let it be read again, or key beside it. */
export function PlacePicture(props: PlacePictureProps) {
  const { sheet, name, aside, placed, onPlaced, busy, error, onPlace, onLeave } = props
  const { corners } = placed
  const onCorners = (set: readonly Corner[]) => onPlaced({ corners: set, tried: false })
  const [asks, ask] = useState<Asks | null>(null)
  const [layoutAt, setLayoutAt] = useState('0')
  const [code, setCode] = useState(sheet.code ?? '')
  const [page] = sheet.pages
  const advice = page?.takeAgain?.advice ?? null
  const layout = LAYOUTS[Number(layoutAt)]
  const place = (set: readonly Corner[] | null) =>
    layout &&
    onPlace({
      version: sheet.version,
      layout: layout.key,
      layoutVersion: layout.version,
      sheetCode: code.trim() === '' ? null : code.trim(),
      corners: set ? set.map(([x, y]): [number, number] => [x, y]) : null,
    })
  const ready = corners.length === 4 && !busy
  const byCorners = () => {
    if (!ready) return
    onPlaced({ corners, tried: true })
    place(corners)
  }
  const beside = () => !busy && place(null)
  const again = () => onCorners([])
  const leave = () => (asks ? ask(null) : onLeave())
  useKeys({
    Escape: leave,
    ...(asks ? {} : { r: byCorners, c: again, b: beside, s: () => ask('send back'), a: () => ask('set aside') }),
  })
  const keys: FootKey[] = [
    { keys: 'r', does: 'read it by these corners', press: byCorners, off: !ready },
    { keys: 'c', does: 'set the corners again', press: again, off: corners.length === 0 },
    { keys: 'b', does: 'key it beside the picture', press: beside, off: busy },
    { keys: 's', does: 'send back', press: () => ask('send back') },
    { keys: 'a', does: 'set aside', press: () => ask('set aside') },
    { keys: 'Escape', does: 'back to the list', press: onLeave },
  ]
  return (
    <Page title={name} over={name} sentence="Where is the sheet in this picture?" aside={aside} keys={asks ? ASKED : keys}>
      <div className="grid grow lg:grid-cols-[minmax(0,1fr)_minmax(380px,30%)]">
        {page ? (
          <CornerPicker src={`/api/pages/${page.id}/original?as=picture`} corners={corners} onCorners={onCorners} />
        ) : (
          <p className="px-margin py-3">This sheet has no picture.</p>
        )}
        <section aria-label="Place the picture" className="border-l-[3px] border-double border-line px-3 py-2 max-lg:border-l-0">
          <p className="text-2 leading-[27px]">
            {placed.tried
              ? 'It could not be read by these corners. Set them again, key it beside the picture, or send it back.'
              : 'The reader could not place this picture. Set the corners of its paper, key it beside the picture, or send it back for a new photo.'}
          </p>
          {advice && <p className="label mt-1">The field was told: “{advice}”</p>}
          <p className="mt-2">
            Click the corners of the sheet’s paper: <strong>{WHICH[corners.length] ?? 'all four are set'}</strong>. With the
            keyboard: focus the picture, move the cross by the arrow keys, set a corner by Enter. A corner outside the picture is
            set outside it.
          </p>
          <div className="mt-2 border-t-2 border-ink">
            <FieldChoice
              label="Layout"
              value={layoutAt}
              onChange={(event) => setLayoutAt(event.target.value)}
              options={LAYOUTS.map((l, i) => ({ value: String(i), words: `${l.key}, version ${l.version}` }))}
            />
            <Field
              label="Sheet code"
              hint="As printed under the title. Leave it empty when it cannot be read."
              value={code}
              autoComplete="off"
              onChange={(event) => setCode(event.target.value)}
            />
          </div>
          {error && (
            <div className="mt-2">
              <ErrorNote error={error} />
            </div>
          )}
          {asks && (
            <div className="mt-2">
              <WhyAway
                key={asks}
                asks={asks}
                advice={advice}
                onSendBack={props.onSendBack}
                onSetAside={props.onSetAside}
                onCancel={() => ask(null)}
              />
            </div>
          )}
          <div className="mt-3 flex flex-wrap items-center gap-3">
            <Button look="ink" disabled={!ready} onClick={byCorners}>
              Read it by these corners
            </Button>
            <Button look="word" onClick={again}>
              Set the corners again
            </Button>
            <Button look="word" disabled={busy} onClick={beside}>
              Key it beside the picture
            </Button>
          </div>
        </section>
      </div>
    </Page>
  )
}

type Asks = 'send back' | 'set aside'

const ASKED: FootKey[] = [
  { keys: 'Enter', does: 'do it, with this reason' },
  { keys: 'Escape', does: 'leave it as it was' },
]

interface WhyAwayProps {
  asks: Asks
  advice: string | null
  onSendBack: (reason: string) => void
  onSetAside: (reason: string) => void
  onCancel: () => void
}

/** Why the sheet leaves the desk without having been read. */
function WhyAway({ asks, advice, onSendBack, onSetAside, onCancel }: WhyAwayProps) {
  return asks === 'send back' ? (
    <ReasonForm
      asks="What should the demonstrator do?"
      hint="They get it by mail and see it on the sheet; a new photo answers it."
      starts={advice ?? ''}
      does="Send the sheet back"
      least={3}
      onReason={onSendBack}
      onCancel={onCancel}
    />
  ) : (
    <ReasonForm
      asks="Why is it set aside?"
      hint="A duplicate, or not a sheet. It is kept, and can be taken up again."
      does="Set it aside"
      least={3}
      onReason={onSetAside}
      onCancel={onCancel}
    />
  )
}

const WHICH = ['upper left first', 'now the upper right', 'now the lower right', 'now the lower left'] as const
