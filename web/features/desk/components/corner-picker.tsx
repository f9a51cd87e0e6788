import { type KeyboardEvent, type MouseEvent, useRef, useState } from 'react'

/** In pixels of the picture. */
export type Corner = readonly [number, number]

interface CornerPickerProps {
  src: string
  corners: readonly Corner[]
  onCorners: (corners: readonly Corner[]) => void
}

/** Steps of the arrow keys, as a share of the picture's width; with Shift the fine one. */
const STEP = 0.02
const FINE = 0.002

/** Sets up to four corners on a picture, by mouse or by keyboard, clockwise from the sheet's upper left. */
export function CornerPicker({ src, corners, onCorners }: CornerPickerProps) {
  const [size, setSize] = useState({ width: 0, height: 0 })
  const [cross, setCross] = useState<Corner>([0.1, 0.1])
  const [failed, setFailed] = useState(false)
  const [focused, setFocused] = useState(false)
  const picture = useRef<HTMLImageElement>(null)
  const add = (x: number, y: number) => corners.length < 4 && onCorners([...corners, [Math.round(x), Math.round(y)]])
  const click = (event: MouseEvent<HTMLButtonElement>) => {
    // A click by Enter or space has no place: those keys set the cross.
    const box = picture.current?.getBoundingClientRect()
    if (event.detail === 0 || !box) return
    add(((event.clientX - box.left) / box.width) * size.width, ((event.clientY - box.top) / box.height) * size.height)
  }
  const pressed = (event: KeyboardEvent) => {
    const step = event.shiftKey ? FINE : STEP
    const move = { ArrowLeft: [-step, 0], ArrowRight: [step, 0], ArrowUp: [0, -step], ArrowDown: [0, step] }[event.key]
    if (event.key === 'Enter') add(cross[0] * size.width, cross[1] * size.height)
    else if (event.key === 'Backspace') onCorners(corners.slice(0, -1))
    else if (move) setCross([within(cross[0] + (move[0] ?? 0)), within(cross[1] + (move[1] ?? 0))])
    else return
    event.preventDefault()
  }
  if (failed) {
    return (
      <p className="px-margin py-3">
        This browser cannot show the file.{' '}
        <a className="word" href={src}>
          Save it
        </a>{' '}
        and look at it, then key the sheet beside it.
      </p>
    )
  }
  return (
    <div className="min-h-0 overflow-auto bg-board p-2">
      <button
        type="button"
        aria-label={`The picture; ${corners.length} of 4 corners set. Arrow keys move the cross, Enter sets a corner, Backspace takes the last back.`}
        className="block cursor-crosshair p-8"
        onFocus={() => setFocused(true)}
        onBlur={() => setFocused(false)}
        onClick={click}
        onKeyDown={pressed}
      >
        <span className="relative block">
          <img
            ref={picture}
            src={src}
            alt=""
            className="block max-h-[calc(100dvh-250px)] max-w-full"
            onLoad={({ currentTarget: { naturalWidth, naturalHeight } }) =>
              setSize({ width: naturalWidth, height: naturalHeight })
            }
            onError={() => setFailed(true)}
          />
          {size.width > 0 && (
            <svg
              aria-hidden="true"
              viewBox={`0 0 ${size.width} ${size.height}`}
              className="pointer-events-none absolute inset-0 h-full w-full overflow-visible"
            >
              <CornerMarks corners={corners} unit={size.width / 100} />
              {focused && (
                <path
                  d={`M${cross[0] * size.width} 0V${size.height}M0 ${cross[1] * size.height}H${size.width}`}
                  stroke="var(--ink)"
                  strokeWidth={size.width / 500}
                  strokeDasharray={size.width / 80}
                />
              )}
            </svg>
          )}
        </span>
      </button>
    </div>
  )
}

/** A corner may lie outside the picture, as far as there is room around it. */
const within = (share: number) => Math.min(1.1, Math.max(-0.1, share))

function CornerMarks({ corners, unit }: { corners: readonly Corner[]; unit: number }) {
  return (
    <>
      <polygon
        points={corners.map(([x, y]) => `${x},${y}`).join(' ')}
        fill="none"
        stroke="var(--ink)"
        strokeWidth={unit * 0.9}
        strokeLinejoin="round"
      />
      <polygon
        points={corners.map(([x, y]) => `${x},${y}`).join(' ')}
        fill="none"
        stroke="var(--straw)"
        strokeWidth={unit * 0.5}
      />
      {corners.map(([x, y], i) => (
        <g key={`${x} ${y}`}>
          <circle cx={x} cy={y} r={unit * 1.6} fill="var(--straw)" stroke="var(--ink)" strokeWidth={unit * 0.3} />
          <text x={x} y={y + unit * 0.8} fontSize={unit * 2.2} fontWeight="700" textAnchor="middle" fill="var(--ink)">
            {i + 1}
          </text>
        </g>
      ))}
    </>
  )
}
