import { memo } from 'react'
import { boxesOf, layComb } from '../../../../shared/layouts/geometry.ts'
import { isComb, type Layout, type LayoutCell } from '../../../../shared/layouts/layout.ts'

/** The printed form as lines, in millimetres: stands under the values where there is no picture. */
export const SheetDrawing = memo(function SheetDrawing({ layout, planned }: { layout: Layout; planned: boolean }) {
  return (
    <g>
      <rect width={layout.page.width} height={layout.page.height} fill="var(--leaf)" />
      <text x={31} y={14} fontSize="5" fontWeight="760" fill="var(--ink)">
        {layout.title}
      </text>
      {layout.sections.map((section) => (
        <g key={section.number}>
          <path d={`M14 ${section.y}H196`} stroke="var(--ink)" strokeWidth="0.5" />
          <text x={14} y={section.y + 4} fontSize="3.2" fontWeight="700" fill="var(--ink)">
            {section.number} {section.title}
          </text>
        </g>
      ))}
      {layout.texts.map((text) => (
        <text
          key={text.text + text.x}
          x={text.x}
          y={text.y}
          fontSize={text.size * 0.35}
          fontWeight={text.weight === 'bold' ? 700 : 430}
          textAnchor={text.align === 'right' ? 'end' : text.align === 'center' ? 'middle' : 'start'}
          fill="var(--graphite)"
        >
          {text.text}
        </text>
      ))}
      {layout.rules.map((rule) => (
        <path
          key={`${rule.x1} ${rule.y1} ${rule.x2}`}
          d={`M${rule.x1} ${rule.y1}L${rule.x2} ${rule.y2}`}
          stroke="var(--ink)"
          strokeWidth={rule.width}
        />
      ))}
      {layout.cells
        .filter((cell) => !(planned && isComb(cell) && cell.planned))
        .map((cell) => (
          <DrawnCell key={cell.key} cell={cell} />
        ))}
    </g>
  )
})

function DrawnCell({ cell }: { cell: LayoutCell }) {
  const boxes = boxesOf(cell)
  const [first] = boxes
  if (!first) return null
  const shown = !('labelShown' in cell && cell.labelShown === false) && !(cell.kind === 'choice' && cell.labelAt === 'none')
  const beside = cell.kind === 'tick'
  const before = cell.kind === 'choice' && cell.labelAt === 'before'
  const at = beside
    ? { x: first.x + 5.4, y: first.y + 3.2 }
    : before
      ? { x: first.x - 1.4, y: first.y + 3.2 }
      : { x: first.x, y: first.y - 1 }
  return (
    <g>
      {boxes.map((box) => (
        <rect
          key={`${box.x} ${box.y}`}
          x={box.x}
          y={box.y}
          width={box.width}
          height={box.height}
          fill="none"
          stroke="var(--line)"
          strokeWidth="0.22"
        />
      ))}
      {isComb(cell) &&
        layComb(cell).separators.map((mark) => (
          <text key={mark.x} x={mark.x} y={mark.y + 6.4} fontSize="4" textAnchor="middle" fill="var(--ink)">
            {mark.mark}
          </text>
        ))}
      {cell.kind === 'choice' &&
        cell.options.map((option) => (
          <text key={option.option} x={option.x + 5} y={option.y + 3.2} fontSize="2.6" fill="var(--ink)">
            {option.label}
          </text>
        ))}
      {shown && (
        <text x={at.x} y={at.y} fontSize="2.6" textAnchor={before ? 'end' : 'start'} fill="var(--graphite)">
          {cell.label}
        </text>
      )}
    </g>
  )
}
