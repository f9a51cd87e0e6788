import { memo } from 'react'
import { boxesOf, cellBounds } from '../../../../shared/layouts/geometry.ts'
import { isComb, type LayoutCell } from '../../../../shared/layouts/layout.ts'
import type { Reading, Values } from '../../../../shared/schemas/sheet.ts'
import { boxCharacters } from '../model/typed-value.ts'

interface CellMarkProps {
  cell: LayoutCell
  reading: Reading
  values: Values
  /** true: there is no ink, so the value stands in its box; false: it hangs on the lower frame. */
  inBox: boolean
}

/** A reading over its ink: hung small on the lower frame, digit under digit, with the mark of how it was settled. Millimetres. */
export const CellMark = memo(function CellMark({ cell, reading, values, inBox }: CellMarkProps) {
  const bounds = cellBounds(cell)
  const pen = reading.origin === 'person'
  return (
    <g fill={pen ? 'var(--pen)' : 'var(--ink)'}>
      {isComb(cell) ? (
        <CombDigits cell={cell} reading={reading} values={values} inBox={inBox} />
      ) : (
        <TickMarks cell={cell} reading={reading} inBox={inBox} />
      )}
      <SettledMark reading={reading} bounds={bounds} />
    </g>
  )
})

function CombDigits({ cell, reading, values, inBox }: CellMarkProps) {
  if (!isComb(cell)) return null
  const boxes = boxesOf(cell)
  const characters = boxCharacters(cell, reading.value, values)
  const size = inBox ? 5.2 : 2.9
  const drop = inBox ? 5.5 : 8
  if (!characters) {
    return (
      <text x={boxes[0]?.x} y={(boxes[0]?.y ?? 0) + drop} fontSize={size} className="figures">
        {String(reading.value)}
      </text>
    )
  }
  return (
    <>
      {boxes.map((box, i) => (
        <text
          key={box.x}
          x={box.x + box.width / 2}
          y={box.y + drop}
          fontSize={size}
          fontWeight={inBox ? 500 : 700}
          textAnchor="middle"
          className="figures"
          stroke={inBox ? 'none' : 'var(--leaf)'}
          strokeWidth={inBox ? 0 : 0.8}
          paintOrder="stroke"
        >
          {characters[i]}
        </text>
      ))}
    </>
  )
}

/** What is taken as ticked: a small leaf on the box's frame, clear of the ink, or a whole one where no ink shows the tick. */
function TickMarks({ cell, reading, inBox }: Pick<CellMarkProps, 'cell' | 'reading' | 'inBox'>) {
  if (cell.kind === 'signature') return null
  const ticked = boxesOf(cell).filter((box) => (box.option === undefined ? reading.value === true : box.option === reading.value))
  return (
    <>
      {ticked.map((box) => (
        <path
          key={`${box.x} ${box.y}`}
          d={LEAF}
          transform={leafIn(box, inBox)}
          opacity={inBox ? 1 : 0.8}
          stroke={inBox ? 'none' : 'var(--leaf)'}
          strokeWidth="0.4"
          strokeLinejoin="round"
          paintOrder="stroke"
        />
      ))}
    </>
  )
}

/** A stalk bent like a tick, with a blade at its long end; one millimetre square. */
const LEAF = 'M0 0.5L0.34 0.98C0.45 0.66 0.66 0.32 1 0C0.6 0.12 0.36 0.4 0.29 0.7L0.12 0.42Z'

function leafIn(box: { x: number; y: number; width: number; height: number }, whole: boolean): string {
  const size = whole ? box.width * 0.86 : box.width * 0.46
  const inset = whole ? (box.width - size) / 2 : -0.5
  return `translate(${box.x + box.width - size - inset} ${box.y + box.height - size - inset}) scale(${size})`
}

type Bounds = ReturnType<typeof cellBounds>

function SettledMark({ reading, bounds }: { reading: Reading; bounds: Bounds }) {
  const { x, y, width, height } = bounds
  const right = x + width
  const low = y + height
  switch (reading.settlement) {
    case 'kept':
      return (
        <g fill="var(--pen)">
          {[1.8, 3.6, 5.4].map((dx) => (
            <circle key={dx} cx={right + dx} cy={low - 1.2} r="0.65" />
          ))}
        </g>
      )
    case 'corrected':
      // Where nothing was read, or the same stands, there is nothing to strike out.
      return reading.readValue === null || reading.readValue === reading.value ? null : (
        <path d={`M${x} ${y + height / 2 + 1}L${right} ${y + height / 2 - 1}`} stroke="var(--pen)" strokeWidth="0.6" />
      )
    case 'unreadable':
      return <rect x={x} y={y} width={width} height={height} fill="url(#hatch)" />
    case 'blank on purpose':
      return (
        <path
          d={`M${x + 1} ${y + 1.2}V${low - 1.2}M${right - 1} ${y + 1.2}V${low - 1.2}M${x + 2.4} ${y + height / 2}H${right - 2.4}`}
          stroke="var(--pen)"
          strokeWidth="0.6"
        />
      )
    default:
      return null
  }
}
