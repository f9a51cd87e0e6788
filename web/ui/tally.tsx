/** Settled stalks stand upright and are tied in fives; waiting ones lean; the one in hand is straw. */
const STEP_PX = 7
/** Many stalks stand closer, so that the tally never pushes the page wide. */
const WIDE_PX = 288
const TALL_PX = 18

export function Tally({ settled, waiting, inHand = false }: { settled: number; waiting: number; inHand?: boolean }) {
  const stalks = Array.from({ length: settled + waiting }, (_, i) => i)
  const step_px = Math.min(STEP_PX, WIDE_PX / Math.max(1, stalks.length))
  const width = Math.max(1, stalks.length) * step_px + STEP_PX
  const tied = Array.from({ length: Math.floor(settled / 5) }, (_, i) => i)
  return (
    <svg
      role="img"
      aria-label={`${settled} settled, ${waiting} wait`}
      width={width}
      height={TALL_PX}
      viewBox={`0 0 ${width} ${TALL_PX}`}
      stroke="var(--ink)"
      strokeWidth="1.6"
    >
      {stalks.map((i) => {
        const x = 4 + i * step_px
        if (i < settled) return <path key={i} d={`M${x} 1V17`} />
        if (inHand && i === settled)
          return <rect key={i} x={x - 1.8} y="1" width="4" height="16" fill="var(--straw)" strokeWidth="1.2" />
        return <path key={i} d={`M${x - 2} 17 ${x + 3} 1`} stroke="var(--graphite)" />
      })}
      {tied.map((i) => (
        <path
          key={`tie${i}`}
          d={`M${2 + i * 5 * step_px} 9H${6 + (i * 5 + 4) * step_px}`}
          stroke="var(--straw)"
          strokeWidth="3"
        />
      ))}
    </svg>
  )
}

/** As many leaning stalks as there are doubts, in groups of five, beyond ten a plus; the count stands beside it. */
export function Stalks({ doubts, held = false }: { doubts: number; held?: boolean }) {
  const shown = Math.min(doubts, 10)
  const places = Array.from({ length: shown }, (_, i) => 3 + i * 5 + Math.floor(i / 5) * 4)
  return (
    <svg
      aria-hidden="true"
      width={(places.at(-1) ?? 0) + (doubts > shown ? 18 : 8)}
      height="14"
      className="inline-block align-[-2px]"
      stroke="var(--ink)"
      strokeWidth="1.5"
    >
      {places.map((x, i) => (
        <path key={x} d={held && i === 0 ? `M${x} 13V1` : `M${x - 2} 13 ${x + 2} 1`} />
      ))}
      {doubts > shown && <path d={`M${(places.at(-1) ?? 0) + 6} 7h8m-4 -4v8`} />}
    </svg>
  )
}
