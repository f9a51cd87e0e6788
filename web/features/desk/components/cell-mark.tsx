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
        <TickMarks cell={cell} reading={reading} />
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

/** A solid square on the corner of what is taken as ticked. */
function TickMarks({ cell, reading }: Pick<CellMarkProps, 'cell' | 'reading'>) {
  const ticked = boxesOf(cell).filter((box) => (box.option === undefined ? reading.value === true : box.option === reading.value))
  return (
    <>
      {ticked.map((box) => (
        <rect
          key={box.x}
          x={box.x + box.width - 1.5}
          y={box.y + box.height - 0.8}
          width="2"
          height="2"
          stroke="var(--leaf)"
          strokeWidth="0.4"
          paintOrder="stroke"
        />
      ))}
    </>
  )
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
      // Where nothing was read there is nothing to strike out.
      return reading.readValue === null ? null : (
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
