import { repeatsOf, type Sources } from '../record-model.ts'

const WIDE = 720
const TALL = 210
const GROUND = 26

/** The depths hung below the ground line where they were measured, with the band of their mean. */
export function Depths({ sources }: { sources: Sources }) {
  const depths = repeatsOf(sources, 'depth_cm')
  const mean = sources.record.results.depth_mean_cm
  if (depths.length < 2 || !mean || mean.value === null) return null
  const most = Math.max(...depths.map((d) => d.value), mean.value + (mean.U ?? 0)) * 1.12
  const y = (cm: number) => GROUND + (cm / most) * (TALL - GROUND)
  const x = (i: number) => 40 + ((i + 0.5) * (WIDE - 60)) / depths.length
  const words = depths.map((d) => d.value.toFixed(1)).join(', ')
  return (
    <section aria-labelledby="depths" className="px-margin pt-3 pb-4">
      <h2 id="depths" className="text-2">
        {depths.length} depths, hung where they were measured
      </h2>
      <p className="label">cm below untouched ground; the band is the mean ± U</p>
      <svg
        viewBox={`0 0 ${WIDE} ${TALL + 8}`}
        className="block w-full max-w-[860px]"
        role="img"
        aria-label={`Depths in cm: ${words}`}
      >
        <rect
          x="34"
          width={WIDE - 40}
          y={y(mean.value - (mean.U ?? 0))}
          height={Math.max(2, y(mean.value + (mean.U ?? 0)) - y(mean.value - (mean.U ?? 0)))}
          fill="var(--straw)"
          stroke="var(--ink)"
          strokeWidth="0.8"
        />
        <line x1="34" x2={WIDE - 6} y1={GROUND} y2={GROUND} stroke="var(--ink)" strokeWidth="3" />
        {depths.map(({ key, value }, i) => (
          <g key={key}>
            <line x1={x(i)} x2={x(i)} y1={GROUND} y2={y(value)} stroke="var(--ink)" strokeWidth="1.2" />
            <path
              d={`M${x(i) - 6} ${y(value) - 5}L${x(i) + 6} ${y(value) + 5}V${y(value) - 5}L${x(i) - 6} ${y(value) + 5}Z`}
              fill="var(--ink)"
            />
            <text x={x(i)} y={GROUND - 8} textAnchor="middle" className="figures" fontSize="13">
              {value.toFixed(1)}
            </text>
          </g>
        ))}
      </svg>
    </section>
  )
}
