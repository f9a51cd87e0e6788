import { useQuery } from '@tanstack/react-query'
import { useRef, useState } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import type { SheetRow } from '../../../shared/schemas/sheet.ts'
import { DeskList } from '../../features/desk/components/desk-list.tsx'
import { deskQueries } from '../../features/desk/desk.queries.ts'
import { groupsOf } from '../../features/desk/desk-groups.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { momentText } from '../../lib/time.ts'
import { useKeys } from '../../lib/use-keys.ts'
import { counted } from '../../lib/words.ts'
import { ButtonLink } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'
import { AT_THE_DESK, DESK_SHUT, OnlyFor } from './only-for.tsx'

const plain = (text: string | null) => (text ?? '').toLowerCase().replaceAll(/[^a-z0-9]/g, '')

export const Component = () => (
  <OnlyFor roles={AT_THE_DESK} title="Desk" says={DESK_SHUT}>
    <DeskListPage />
  </OnlyFor>
)

function DeskListPage() {
  const me = useMe()
  const navigate = useNavigate()
  const list = useQuery(deskQueries.list())
  const [params, setParams] = useSearchParams()
  // The box has its own text: the address follows it later than the next letter comes.
  const [find, setFind] = useState(params.get('find') ?? '')
  const field = useRef<HTMLInputElement>(null)
  const sheets = (list.data?.sheets ?? []).filter((row) => foundIn(row, find))
  const groups = groupsOf(sheets)
  const rows = groups.flatMap((group) => group.rows)
  const [chosenId, choose] = useState<string | null>(null)
  const at = Math.max(
    0,
    rows.findIndex((row) => row.id === chosenId),
  )
  const chosen = rows[at] ?? null
  const open = (row: SheetRow | null) => row && navigate(paths.deskSheet.to(row.id))
  const step = (by: number) => {
    const next = rows[Math.min(rows.length - 1, Math.max(0, at + by))]
    if (next) choose(next.id)
  }
  const keys = [
    { key: 'ArrowDown', act: () => step(1) },
    { key: 'ArrowUp', act: () => step(-1) },
    { key: 'Enter', act: () => open(chosen) },
    { key: '/', act: () => field.current?.focus() },
  ]
  const findBy = (text: string) => {
    setFind(text)
    setParams(text === '' ? {} : { find: text }, { replace: true })
  }
  useKeys(Object.fromEntries(keys.map(({ key, act }) => [key, act])))
  return (
    <Page
      title="Desk"
      sentence={list.data ? sentenceOf(rows, list.data.sheets.length) : 'The desk'}
      aside={
        <label className="flex items-center gap-1">
          <span className="label">find</span>
          <input
            ref={field}
            type="search"
            value={find}
            placeholder="code, place, name"
            onChange={(event) => findBy(event.target.value)}
            onKeyDown={(event) => {
              if (event.key === 'Enter') open(rows[0] ?? null)
              if (event.key === 'Escape') {
                findBy('')
                event.currentTarget.blur()
              }
            }}
            className="figures min-h-[36px] w-[216px] border-b-[1.5px] border-ink bg-leaf px-1 text-pen placeholder:text-graphite"
          />
        </label>
      }
      keys={[
        { keys: '↑ ↓', does: 'choose' },
        { keys: 'Enter', does: 'take in hand', press: () => open(chosen), off: chosen === null },
        { keys: '/', does: 'find a sheet', press: () => field.current?.focus() },
      ]}
    >
      {list.error && <ErrorState error={list.error} again={() => list.refetch()} />}
      {list.isPending && <Loading what="Looking at what waits" />}
      {list.data && rows.length === 0 && (
        <EmptyState
          says={
            list.data.sheets.length === 0
              ? 'No sheet waits. What is sent and can be read without a doubt waits here only to be entered.'
              : 'Escape in the box shows all that wait.'
          }
          next={list.data.sheets.length === 0 ? <ButtonLink to={paths.send.to()}>Send sheets</ButtonLink> : null}
        />
      )}
      {rows.length > 0 && <DeskList groups={groups} chosen={chosen?.id ?? null} meId={me.id} onOpen={open} />}
    </Page>
  )
}

const foundIn = (row: SheetRow, find: string) =>
  find === '' ||
  [row.code, row.place, row.tractor, row.implement, row.demonstrator].some((text) => plain(text).includes(plain(find)))

function sentenceOf(rows: readonly SheetRow[], waiting: number): string {
  if (rows.length === 0 && waiting > 0) return 'No sheet at the desk fits that.'
  const [oldest] = [...rows].filter((row) => row.arrivedAt).sort((a, b) => (a.arrivedAt ?? '').localeCompare(b.arrivedAt ?? ''))
  if (rows.length === 0 || !oldest?.arrivedAt) return 'Nothing waits at the desk.'
  const doubts = rows.reduce((sum, row) => sum + row.openDoubts, 0)
  return `${counted(rows.length, 'sheet')} ${rows.length === 1 ? 'waits' : 'wait'} at the desk with ${counted(doubts, 'doubt')}. The oldest came ${momentText(oldest.arrivedAt)}.`
}
