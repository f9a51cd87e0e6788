/** Makes the files of one sample: the picture or PDF, and what was written. */
import { hourMeterAt } from '../../server/demo/season.ts'
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import { goldenScenario } from './golden.ts'
import { makePhoto, type Photo } from './make-photo.ts'
import { photographGround } from './photograph.ts'
import { chanceOf } from './random.ts'
import type { SampleCase } from './sample-cases.ts'
import { haulageScenario } from './sample-haulage.ts'
import { headOf, planLinesOf, SAMPLE_RUNS, type SampleRun } from './sample-season.ts'
import { drawScanPlan } from './scan.ts'
import { pagesToPdf } from './scan-pdf.ts'
import type { Scenario, Truth } from './scenario.ts'
import { MACHINES, tillageScenario } from './scenario-tillage.ts'

export interface SampleFile {
  name: string
  content: string | Buffer
}

const LAYOUT = findLayout('tillage', 1)!
const json = (value: unknown) => `${JSON.stringify(value, null, 1)}\n`

/** A sheet of the season, or one that nobody planned. */
async function sampleSheet(sample: SampleCase, run: SampleRun | undefined): Promise<Photo> {
  const layout = sample.layout === haulage1.key ? haulage1 : LAYOUT
  const seed = `sample ${sample.case} ${run?.page ?? ''}${sample.draw ? ` draw ${sample.draw}` : ''}`
  const chance = chanceOf(seed)
  const head = run && headOf(run)
  const machine = MACHINES.find((m) => m.implement_id === run?.ids.implement_id)
  const scenario =
    sample.case === 'golden' && head
      ? goldenScenario(head)
      : layout === haulage1
        ? haulageScenario(chance.fork('scenario'))
        : drawUntil(
            (n) => tillageScenario(chance.fork(`scenario ${n}`), { head, machine, worthwhile: true }),
            (s) =>
              (sample.case !== 'four-sides' || (s.readings.side_cd_m !== null && s.readings.area_unit === 'acre')) &&
              inItsTurn(s, run),
          )
  if (run) setHourMeter(scenario, run)
  sample.change?.(scenario, layout)
  return makePhoto({
    layout,
    level: sample.level,
    chance,
    digits: 'held back',
    planned: run?.planned ?? false,
    scenario,
    sheetCode: run?.sheetCode,
    planLines: run && planLinesOf(run),
    writer: sample.writer,
    adjust: sample.adjust,
  })
}

/** A tractor works one run after the other: each has its part of the day. */
const TURNS = [
  ['07:00', '10:30'],
  ['10:35', '13:20'],
  ['13:25', '17:00'],
] as const

function inItsTurn({ readings }: Scenario, run: SampleRun | undefined): boolean {
  const [from, to] = TURNS[(run?.run ?? 0) - 1] ?? ['00:00', '23:59']
  return String(readings.t_start) >= from && String(readings.t_end) <= to
}

function setHourMeter({ readings }: Scenario, run: SampleRun): void {
  const span = Number(readings.hour_meter_end) - Number(readings.hour_meter_start)
  const start = hourMeterAt(run.ids.tractor_id, run.trial_date, run.run)
  Object.assign(readings, { hour_meter_start: start, hour_meter_end: Math.round((start + span) * 10) / 10 })
}

function drawUntil<T>(draw: (n: number) => T, fits: (value: T) => boolean): T {
  for (let n = 0; ; n += 1) {
    const value = draw(n)
    if (fits(value)) return value
  }
}

export async function makeSample(sample: SampleCase): Promise<SampleFile[]> {
  const runs = SAMPLE_RUNS.filter((r) => r.case === sample.case)
  if (sample.case === 'nothing') {
    const jpeg = await photographGround('soil', chanceOf('sample nothing'))
    const truth = { layout: null, version: null, sheet: null, level: sample.level, readings: {}, spoiled: [], wrongSum: [] }
    return [
      { name: 'nothing.jpg', content: jpeg },
      { name: 'nothing.truth.json', content: json(truth) },
    ]
  }
  if (runs.length > 1) {
    const pages: Photo[] = []
    for (const run of runs) {
      const scan = {
        ...drawScanPlan(chanceOf(`sample scan ${run.page}`)),
        dpi: 200,
        grey: true,
        copied: false,
        jpegQuality: 75,
        scale: 1,
      }
      pages.push(await sampleSheet({ ...sample, adjust: (c) => ({ ...(sample.adjust?.(c) ?? c), scan }) }, run))
    }
    const truths: Truth[] = pages.map((p) => p.truth)
    return [
      {
        name: `${sample.case}.pdf`,
        content: await pagesToPdf(
          pages.map((p) => p.jpeg),
          LAYOUT.page,
        ),
      },
      { name: `${sample.case}.truth.json`, content: json(truths) },
    ]
  }
  const photo = await sampleSheet(sample, runs[0])
  return [
    { name: `${sample.case}.jpg`, content: photo.jpeg },
    { name: `${sample.case}.truth.json`, content: json(photo.truth) },
  ]
}
