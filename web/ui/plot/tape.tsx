import { PlotText } from './marks.tsx'
import type { TapeScale } from './tape-scale.ts'

/** The tape under a plot, with thin rules up through it; unit and a truncated start in words. */
export function PlotTape({ tape, top, y, unit }: { tape: TapeScale; top: number; y: number; unit: string }) {
  const [left, right] = [tape.at(tape.from), tape.at(tape.to)]
  return (
    <g>
      {tape.major.map((figure) => (
        <path key={figure} d={`M${tape.at(figure)} ${top}V${y}`} stroke="var(--feint)" strokeWidth="1" />
      ))}
      {tape.from < 0 && tape.to > 0 && <path d={`M${tape.at(0)} ${top}V${y}`} stroke="var(--ink)" strokeWidth="2" />}
      <path d={`M${left} ${y}H${right}`} stroke="var(--ink)" strokeWidth="1.6" />
      {tape.minor.map((figure) => (
        <path key={figure} d={`M${tape.at(figure)} ${y}v5`} stroke="var(--line)" strokeWidth="1" />
      ))}
      {tape.major.map((figure) => (
        <g key={figure}>
          <path d={`M${tape.at(figure)} ${y}v9`} stroke="var(--ink)" strokeWidth="1.6" />
          <PlotText x={tape.at(figure)} y={y + 23} anchor="middle" figures>
            {figureText(figure)}
          </PlotText>
        </g>
      ))}
      <PlotText x={right} y={y + 42} anchor="end" faint>
        {`${unit}${tape.from > 0 ? `; the tape begins at ${figureText(tape.from)}` : ''}`}
      </PlotText>
    </g>
  )
}

const figureText = (figure: number): string => String(Number(figure.toPrecision(8))).replace('-', '−')

/** Room the tape takes below its line. */
export const TAPE_PX = 50
