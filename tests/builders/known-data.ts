/** Data sets whose results are published, as observations. Files: tests/fixtures/reference, sources in its README. */
import { readFileSync } from 'node:fs'
import type { Observation } from '../../shared/compare/observations.ts'

const FOLDER = 'tests/fixtures/reference'
export const referenceText = (file: string): string => readFileSync(`${FOLDER}/${file}`, 'utf8')

/** Values in groups, without blocks. */
export const grouped = (groups: Record<string, readonly number[]>): Observation[] =>
  Object.entries(groups).flatMap(([treatment, values]) =>
    values.map((value, i) => ({ id: `${treatment} ${i + 1}`, treatment, block: null, value })),
  )

/** Values in groups whose nth values share block n. */
export const sideBySide = (groups: Record<string, readonly number[]>): Observation[] =>
  Object.entries(groups).flatMap(([treatment, values]) =>
    values.map((value, i) => ({ id: `${treatment} ${i + 1}`, treatment, block: String(i + 1), value })),
  )

/** R datasets, from memory: extra hours of sleep, two drugs on the same ten people (Cushny and Peebles 1905). */
export const SLEEP = {
  '1': [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2],
  '2': [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4],
}

/** R datasets, from memory: dried weight of plants under a control and two treatments (Dobson 1983). */
export const PLANT_GROWTH = {
  ctrl: [4.17, 5.58, 5.18, 6.11, 4.5, 4.61, 5.17, 4.53, 5.33, 5.14],
  trt1: [4.81, 4.17, 4.41, 3.59, 5.87, 3.83, 6.03, 4.89, 4.32, 4.69],
  trt2: [6.31, 5.12, 5.54, 5.5, 5.37, 5.29, 4.92, 6.15, 5.8, 5.26],
}

/** R datasets, from memory: pea yields in 6 blocks of 4 plots (Yates 1937); letters name what a plot was given. */
export const NPK: readonly { block: string; given: string; yield: number }[] = (
  [
    ['PK 49.5', 'NP 62.8', '- 46.8', 'NK 57'],
    ['N 59.8', 'NPK 58.5', 'K 55.5', 'P 56'],
    ['P 62.8', 'NPK 55.8', 'N 69.5', 'K 55'],
    ['N 62', 'NPK 48.8', 'K 45.5', 'P 44.2'],
    ['NP 52', '- 51.5', 'NK 49.8', 'PK 48.8'],
    ['NK 57.2', 'NP 59', 'PK 53.2', '- 56'],
  ] as const
).flatMap((plots, i) =>
  plots.map((plot) => {
    const [given = '', grown] = plot.split(' ')
    return { block: String(i + 1), given, yield: Number(grown) }
  }),
)

/** An invented pair of tractors on six plots, L/ha; results computed in R. */
export const SIX_PLOTS = { A: [14.1, 13.2, 15, 12.8, 13.9, 14.4], B: [12.9, 12.7, 13.6, 12.5, 12.6, 13.9] }

/** NIST e-Handbook 1.3.5.17.1, with one wild value. */
export const GRUBBS_EXAMPLE = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57]

/** One year of the barley: place, variety, yield. */
export function immer(column: 'Y1' | 'Y2'): Observation[] {
  const [, ...lines] = referenceText('immer.csv').trim().split('\n')
  return lines.map((line, i) => {
    const [place = '', variety = '', y1, y2] = line.replaceAll('"', '').split(',')
    return { id: String(i + 2), treatment: variety, block: place, value: Number(column === 'Y1' ? y1 : y2) }
  })
}

/** A NIST one-way file: group and value from line 61 on. */
export const nistGroups = (file: string): Observation[] =>
  referenceText(file)
    .split('\n')
    .slice(60)
    .filter((line) => line.trim() !== '')
    .map((line, i) => {
      const [treatment = '', value] = line.trim().split(/\s+/)
      return { id: String(i + 1), treatment, block: null, value: Number(value) }
    })

/** NIST SmLs01 to 09 are made by a rule: nine treatments, a base, and steps of 0.1 around 0.4, 0.3 or 0.5. */
export function smLs(base: number, replicates: number): Observation[] {
  const middles = [0.4, 0.3, 0.5, 0.3, 0.5, 0.3, 0.5, 0.3, 0.5]
  return middles.flatMap((middle, i) =>
    Array.from({ length: replicates }, (_, r) => {
      const step = r === 0 ? 0 : r % 2 === 1 ? -0.1 : 0.1
      return { id: `${i + 1}.${r + 1}`, treatment: String(i + 1), block: null, value: base + Number((middle + step).toFixed(1)) }
    }),
  )
}
