import { Ink } from '../../../ui/ink.tsx'
import { pictureOf, repeatsOf, type Sources } from '../record-model.ts'

const TALL_PX = 216
/** Room over the ground line for the figures; on a phone they stand in two rows. */
const GROUND_PX = 44
const FOOT_PX = 26
const CROP_SCALE = 2.9

/** The depths hung below the ground line where they were measured, with the band of their mean; the ink is the data point. */
export function Depths({ sources }: { sources: Sources }) {
  const depths = repeatsOf(sources, 'depth_cm')
  const mean = sources.record.results.depth_mean_cm
  if (depths.length < 2 || !mean || mean.value === null) return null
  const [low, high] = [mean.value - (mean.U ?? 0), mean.value + (mean.U ?? 0)]
  const least = Math.min(low, ...depths.map((d) => d.value))
  const most = Math.max(high, ...depths.map((d) => d.value))
  const from = Math.max(0, Math.floor((least - (most - least) * 1.2) / 2) * 2)
  const y = (cm: number) => GROUND_PX + ((cm - from) / (most - from)) * (TALL_PX - GROUND_PX - FOOT_PX)
  const x = (i: number) => `${4 + ((i + 0.5) * 94) / depths.length}%`
  const words = depths.map((d) => d.value.toFixed(1)).join(', ')
  return (
    <section aria-labelledby="depths" className="px-margin pt-3 pb-3">
      <h2 id="depths" className="text-2">
        {depths.length} depths, hung where they were measured
      </h2>
      <p className="label">cm below untouched ground{from > 0 ? `, drawn from ${from} cm down` : ''}; the band is the mean ± U</p>
      <svg
        role="img"
        aria-label={`Depths in cm: ${words}`}
        width="100%"
        height={TALL_PX}
        className="block max-w-[960px] overflow-visible"
      >
        <rect
          x="4%"
          width="95%"
          y={y(low)}
          height={Math.max(2, y(high) - y(low))}
          fill="var(--straw-pale)"
          stroke="var(--ink)"
          strokeWidth="0.8"
        />
        <line x1="4%" x2="99%" y1={y(mean.value)} y2={y(mean.value)} stroke="var(--ink)" strokeWidth="1.4" />
        <line x1="4%" x2="99%" y1={GROUND_PX} y2={GROUND_PX} stroke="var(--ink)" strokeWidth="3" />
        <g>
          {depths.map(({ key, value }, i) => (
            <Hung key={key} sources={sources} depth={{ key, value }} x={x(i)} y={y(value)} high={i % 2 === 1} />
          ))}
        </g>
      </svg>
    </section>
  )
}

interface HungProps {
  sources: Sources
  depth: { key: string; value: number }
  x: string
  y: number
  /** Its figure stands in the upper row on a phone, where ten do not fit beside each other. */
  high: boolean
}

function Hung({ sources, depth, x, y, high }: HungProps) {
  const cell = sources.cells.get(depth.key)
  const picture = pictureOf(sources, depth.key)
  return (
    <>
      <line x1={x} x2={x} y1={GROUND_PX} y2={y} stroke="var(--ink)" strokeWidth="1.2" />
      <text
        x={x}
        y={GROUND_PX - 9}
        textAnchor="middle"
        className={`figures ${high ? 'max-sm:-translate-y-[18px]' : ''}`}
        fontSize="14"
        fill="var(--ink)"
      >
        {depth.value.toFixed(1)}
      </text>
      <svg x={x} y={y} overflow="visible" aria-hidden="true">
        <path d="M-7-5.5 7 5.5V-5.5L-7 5.5Z" fill="var(--ink)" className={cell && picture ? 'lg:hidden' : ''} />
        {cell && picture && (
          <g className="max-lg:hidden" transform="translate(-30 -13)">
            <Ink layout={sources.layout} cell={cell} picture={picture} scale={CROP_SCALE} around_mm={0.8} />
          </g>
        )}
      </svg>
    </>
  )
}
