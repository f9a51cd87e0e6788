import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { Link, useLocation, useNavigate, useParams } from 'react-router-dom'
import { z } from 'zod'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import { DeskSheet } from '../../features/desk/components/desk-sheet.tsx'
import { type Placed, PlacePicture } from '../../features/desk/components/place-picture.tsx'
import { deskQueries, usePlace, useSendBack, useSetAside, useTakeUp } from '../../features/desk/desk.queries.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { useKeys } from '../../lib/use-keys.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { AT_THE_DESK, DESK_SHUT, OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={AT_THE_DESK} title="Desk" says={DESK_SHUT}>
    <DeskSheetPage />
  </OnlyFor>
)

function DeskSheetPage() {
  const { id = '' } = useParams()
  const me = useMe()
  const navigate = useNavigate()
  const starts = enteredWords(useLocation().state)
  const sheet = useQuery(deskQueries.detail(id))
  const next = useNextAhead(id, me.id)
  // Held here: the page of the picture goes while it is read again.
  const [placing, setPlacing] = useState<{ id: string; placed: Placed } | null>(null)
  if (sheet.error && !sheet.data) return <ErrorState error={sheet.error} again={() => sheet.refetch()} />
  if (!sheet.data) return <Loading what="Taking the sheet in hand" />
  const { state, layout: key, layoutVersion } = sheet.data
  const layout = key ? findLayout(key, layoutVersion ?? undefined) : null
  if (state === 'being read' || state === 'arrived')
    return <Loading what="The sheet is being read again by its corners. A few seconds." />
  if (state === 'unreadable' || !layout)
    return (
      <>
        {starts && <Saved says={starts} />}
        <Placing
          key={id}
          sheet={sheet.data}
          placed={placing?.id === id ? placing.placed : placedOn(sheet.data)}
          onPlaced={(placed) => setPlacing({ id, placed })}
        />
      </>
    )
  if (state === 'sent back' || state === 'set aside' || state === 'entered' || state === 'printed')
    return <Away sheet={sheet.data} next={next} />
  return (
    <DeskSheet
      key={id}
      sheet={sheet.data}
      layout={layout}
      me={me}
      back={
        <Link className="word" to={paths.desk.to()}>
          List
        </Link>
      }
      onLeave={(to) => navigate(to ? paths.deskSheet.to(to) : paths.desk.to())}
      // With none left it stays: the page says that it is entered.
      onEntered={({ next: to, recordNumber }) => to && navigate(paths.deskSheet.to(to), { state: { entered: recordNumber } })}
      starts={starts}
      next={next}
    />
  )
}

/** What the sheet before became, handed over with the address of this one. */
function enteredWords(state: unknown): string | null {
  const handed = z.object({ entered: z.number() }).safeParse(state)
  return handed.success ? `Entered as record ${handed.data.entered}. This is the next sheet.` : null
}

/** The next sheet is fetched while this one is worked on, so that entering one opens the other at once. */
function useNextAhead(id: string, meId: string): string | null {
  const cache = useQueryClient()
  const list = useQuery(deskQueries.list())
  // The server names the oldest free one when a sheet is entered.
  const next = list.data?.sheets.find((row) => row.id !== id && (row.inHand === null || row.inHand.userId === meId))?.id
  useEffect(() => {
    if (next) void cache.prefetchQuery({ ...deskQueries.detail(next), staleTime: 60_000 })
  }, [next, cache])
  return next ?? null
}

const nameOf = (sheet: Sheet) => (sheet.code ? formatSheetCode(sheet.code) : 'Sheet without a code')

/** The corners a person set before, if it could not be read by them. */
function placedOn({ pages: [page] }: Sheet): Placed {
  const corners = page?.placedCorners ?? []
  return { corners, tried: corners.length > 0 }
}

function Placing({ sheet, placed, onPlaced }: { sheet: Sheet; placed: Placed; onPlaced: (placed: Placed) => void }) {
  const navigate = useNavigate()
  const { id, version } = sheet
  const [place, sendBack, setAside] = [usePlace(id), useSendBack(id), useSetAside(id)]
  const toList = () => navigate(paths.desk.to())
  return (
    <PlacePicture
      sheet={sheet}
      name={nameOf(sheet)}
      aside={<BackToList />}
      placed={placed}
      onPlaced={onPlaced}
      busy={place.isPending}
      error={place.error ?? sendBack.error ?? setAside.error}
      onPlace={place.mutate}
      onSendBack={(reason) => sendBack.mutate({ version, reason, cells: [] }, { onSuccess: toList })}
      onSetAside={(reason) => setAside.mutate({ version, reason }, { onSuccess: toList })}
      onLeave={toList}
    />
  )
}

const SAID: Partial<Record<Sheet['state'], string>> = {
  'sent back': 'It was sent back and waits for the field.',
  'set aside': 'It was set aside.',
  printed: 'It is printed; no picture of it has come yet.',
}

/** A sheet that is not at the desk: why, and the way back to it. */
function Away({ sheet, next }: { sheet: Sheet; next: string | null }) {
  const navigate = useNavigate()
  const takeUp = useTakeUp(sheet.id)
  const reason = sheet.state === 'sent back' ? sheet.sentBackReason : sheet.reason
  const toList = () => navigate(paths.desk.to())
  const toNext = next ? () => navigate(paths.deskSheet.to(next)) : null
  useKeys({ Enter: toList, Escape: toList, ...(toNext ? { n: toNext } : {}) })
  const keys = [
    { keys: 'Enter', does: 'back to the list', press: toList },
    ...(toNext ? [{ keys: 'n', does: 'next sheet', press: toNext }] : []),
  ]
  const said = sheet.state === 'entered' ? `Entered as record ${sheet.recordNumber}.` : (SAID[sheet.state] ?? sheet.state)
  return (
    <Page title={nameOf(sheet)} over={nameOf(sheet)} sentence={said} aside={<BackToList />} keys={keys}>
      <div className="px-margin py-3">
        {sheet.state === 'entered' && next === null && (
          <p role="status" className="mb-1 text-2">
            No other sheet waits at the desk.
          </p>
        )}
        {reason && <p className="text-2 text-pen">“{reason}”</p>}
        {takeUp.error && <ErrorState error={takeUp.error} />}
        <div className="mt-2 flex gap-3">
          {(sheet.state === 'sent back' || sheet.state === 'set aside') && (
            <Button onClick={() => takeUp.mutate({ version: sheet.version })} disabled={takeUp.isPending}>
              Take it up again
            </Button>
          )}
          {sheet.recordNumber !== null && (
            <Link className="word self-center" to={paths.record.to(sheet.recordNumber)}>
              Record {sheet.recordNumber}
            </Link>
          )}
        </div>
      </div>
    </Page>
  )
}

const BackToList = () => (
  <Link className="word" to={paths.desk.to()}>
    Back to the list
  </Link>
)
