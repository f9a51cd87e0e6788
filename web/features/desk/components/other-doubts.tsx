import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import type { LayoutCell } from '../../../../shared/layouts/layout.ts'
import { Glyph, type GlyphName } from '../../../ui/glyphs.tsx'
import type { DeskItem } from '../model/desk-items.ts'
import type { Desk } from '../use-desk.ts'

/** All doubts of the sheet in order of work; any may be taken in hand. */
export function OtherDoubts({ desk }: { desk: Desk }) {
  const cells = new Map(desk.layout.cells.map((c) => [c.key, c]))
  return (
    <ol aria-label="Doubts of this sheet, in order of work" className="border-t-[1.5px] border-ink">
      {desk.items.map((item) => (
        <li key={item.id} className="border-b border-feint">
          <button
            type="button"
            aria-current={item.id === desk.item?.id ? 'true' : undefined}
            onClick={() => desk.go(item.id)}
            className="flex min-h-[30px] w-full items-baseline gap-1 py-0.5 text-left aria-current:bg-straw-pale"
          >
            <span className="figures w-3 shrink-0 text-right">{item.number}</span>
            <Glyph name={glyphOf(item)} pen={!item.open} />
            <span className="min-w-0 grow">
              {item.label} <Told item={item} cell={cells.get(item.reading?.key ?? '')} />
            </span>
          </button>
        </li>
      ))}
    </ol>
  )
}

const glyphOf = (item: DeskItem): GlyphName => {
  if (item.open) return 'doubt'
  const how = item.reading?.settlement
  if (how === 'unreadable' || how === 'corrected') return how
  return how === 'blank on purpose' ? 'blank' : 'kept'
}

function Told({ item, cell }: { item: DeskItem; cell: LayoutCell | undefined }) {
  const { reading, doubt } = item
  if (doubt) {
    return item.open ? (
      <span className="text-graphite">{doubt.severity === 'stop' ? 'stops results' : ''}</span>
    ) : (
      <Pen>stands, {doubt.settledBy}</Pen>
    )
  }
  if (!reading) return null
  const value = <span className="figures">{formatValue(cell, reading.value)}</span>
  if (item.open) return value
  return (
    <>
      {value}{' '}
      <Pen>
        {reading.settlement}, {reading.settledBy}
      </Pen>
    </>
  )
}

const Pen = ({ children }: { children: React.ReactNode }) => <span className="text-pen">{children}</span>
