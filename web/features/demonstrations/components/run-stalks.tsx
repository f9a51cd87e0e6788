/** Runs of a day as stalks: entered ones stand, arrived ones lean, those still to come are stubs on the ground line. */
const STEP_PX = 8
const MOST = 36

interface RunStalksProps {
  runs: number
  arrived: number
  entered: number
}

export function RunStalks({ runs, arrived, entered }: RunStalksProps) {
  const shown = Math.min(runs, MOST)
  return (
    <svg
      aria-hidden="true"
      width={shown * STEP_PX + 6}
      height="18"
      className="inline-block align-[-4px]"
      stroke="var(--ink)"
      strokeWidth="1.6"
    >
      <path d={`M0 16.5H${shown * STEP_PX + 6}`} stroke="var(--line)" strokeWidth="1" />
      {Array.from({ length: shown }, (_, i) => 7 + i * STEP_PX).map((x, i) => (
        <path key={x} d={i < entered ? `M${x} 16V2` : i < arrived ? `M${x - 2} 16 ${x + 3} 3` : `M${x} 16V12`} />
      ))}
    </svg>
  )
}

/** The same in words: "3 runs, 2 arrived, 1 entered". */
export function runWords({ runs, arrived, entered }: RunStalksProps): string {
  const so = [arrived > 0 ? `${arrived} arrived` : 'none arrived', entered > 0 ? `${entered} entered` : ''].filter(Boolean)
  return `${runs} ${runs === 1 ? 'run' : 'runs'}, ${so.join(', ')}`
}
