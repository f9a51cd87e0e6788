import { useState } from 'react'
import { LAYOUTS } from '../../../../shared/layouts/registry.ts'
import type { PlaceSheet, Sheet } from '../../../../shared/schemas/sheet.ts'
import { Button } from '../../../ui/button.tsx'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { type Corner, CornerPicker } from './corner-picker.tsx'

interface PlacePictureProps {
  sheet: Sheet
  busy: boolean
  error: Error | null
  onPlace: (input: PlaceSheet) => void
}

/** A picture the reader could not place: set the sheet's four corners and let it be read again, or key beside it. */
export function PlacePicture({ sheet, busy, error, onPlace }: PlacePictureProps) {
  const [corners, setCorners] = useState<readonly Corner[]>([])
  const [layoutAt, setLayoutAt] = useState('0')
  const [code, setCode] = useState(sheet.code ?? '')
  const [page] = sheet.pages
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
  return (
    <div className="grid grow lg:grid-cols-[minmax(0,1fr)_minmax(380px,30%)]">
      {page ? (
        <CornerPicker src={`/api/pages/${page.id}/original?as=picture`} corners={corners} onCorners={setCorners} />
      ) : (
        <p className="px-margin py-3">This sheet has no picture.</p>
      )}
      <section aria-label="Place the picture" className="border-l-[3px] border-double border-line px-3 py-2 max-lg:border-l-0">
        <p className="text-2 leading-[27px]">
          {page?.takeAgain?.advice ?? sheet.reason ?? 'The reader did not find a sheet in this picture.'}
        </p>
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
        <div className="mt-3 flex flex-wrap items-center gap-3">
          <Button look="ink" disabled={corners.length !== 4 || busy} onClick={() => place(corners)}>
            Read it by these corners
          </Button>
          <Button look="word" onClick={() => setCorners([])}>
            Set the corners again
          </Button>
          <Button look="word" disabled={busy} onClick={() => place(null)}>
            Key it beside the picture
          </Button>
        </div>
      </section>
    </div>
  )
}

const WHICH = ['upper left first', 'now the upper right', 'now the lower right', 'now the lower left'] as const
