import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type BookComparison, bookComparisonSchema, exclusionLogSchema } from '../../shared/schemas/book-comparison.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import { burning, enterRun } from '../builders/entered-run.ts'
import { PLANT_GROWTH, SIX_PLOTS } from '../builders/known-data.ts'
import { createImplement, createKit, createPlace, createTractor } from '../builders/register.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let clerk: Awaited<ReturnType<TestServer['signIn']>>
let analyst: Awaited<ReturnType<TestServer['signIn']>>
let demonstrator: Awaited<ReturnType<TestServer['signIn']>>

/** Marks of 2 mL, so that fuel can be written to the millilitre. */
const FINE = { jarMark_ml: 2, jugMark_ml: 2 }
const day = (n: number) => new Date(Date.UTC(2026, 5, 1 + n)).toISOString().slice(0, 10)
const ask = async (query: Record<string, string>): Promise<BookComparison> => {
  const answer = await analyst.get(`/comparisons?${new URLSearchParams(query)}`)
  if (answer.status !== 200) throw new Error(JSON.stringify(answer.body))
  return bookComparisonSchema.parse(answer.body)
}

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
  analyst = await server.signIn('analyst')
  demonstrator = await server.signIn('demonstrator')
})
afterAll(() => server.close())

async function machines(names: readonly string[], district: string) {
  const db = server.deps.source.manager
  return {
    place: await createPlace(db, { district }),
    kit: await createKit(db, FINE),
    implement: await createImplement(db),
    tractors: await Promise.all(
      names.map((name) => createTractor(db, { name, ptoPower_kw: 32, ratedPower_kw: 37, drive: '2WD' })),
    ),
  }
}

describe('three tractors on unlike fields', () => {
  const DISTRICT = 'Plains'
  // R's PlantGrowth, a hundredth as 7 mL on 2700 m²: 2.59 L/ha for 1. Tests and p values do not change with the unit.
  const PER_UNIT_ML = 700

  beforeAll(async () => {
    const { place, kit, implement, tractors } = await machines(Object.keys(PLANT_GROWTH), DISTRICT)
    const runs = Object.values(PLANT_GROWTH).flatMap((values, i) => values.map((value) => ({ value, tractor: tractors[i]! })))
    // The latest day first: then no run clashes with another, and no hour meter goes back.
    for (const [i, { value, tractor }] of [...runs.entries()].reverse()) {
      const readings = {
        ...burning(Math.round(value * PER_UNIT_ML)),
        trial_date: day(i),
        demonstrator_id: demonstrator.user.number,
        place_id: place.number,
        kit_id: kit.number,
        implement_id: implement.number,
        tractor_id: tractor.number,
      }
      await enterRun(server, clerk, { sender: demonstrator.user.id, readings })
    }
  }, 180_000)

  it('give R’s PlantGrowth, and no ranking', async () => {
    const { analysis, claim, runs, runU } = await ask({ region: DISTRICT })
    expect(analysis?.design).toMatchObject({ kind: 'one factor', treatments: ['ctrl', 'trt1', 'trt2'], n: 30 })
    expect(analysis?.design.why).toContain('unlike fields')
    // R 4.2.2: F 4.84609, p 0.01591; Tukey and Holm of trt1-ctrl, trt2-ctrl, trt2-trt1.
    expect(analysis?.squares?.[0]?.f).toBeCloseTo(4.84609, 5)
    expect(analysis?.squares?.[0]?.p).toBeCloseTo(0.01591, 5)
    expect(analysis?.pairwise.map((p) => p.pTukey.toFixed(9))).toEqual(['0.390871144', '0.197995991', '0.012006424'])
    expect(analysis?.pairwise.map((p) => p.pHolm.toFixed(8))).toEqual(['0.19438788', '0.17536335', '0.01337771'])
    expect(runs).toHaveLength(30)
    expect(runU).toBeGreaterThan(0)
    expect(claim.may).toBe(false)
    expect(claim.because.join()).toContain('the fields differ as well as the tractors')
  })

  it('are narrowed by the filters in the address, and a choice that leaves one says so', async () => {
    const two = await ask({ region: DISTRICT })
    const ids = two.choices.tractor!.filter((c) => c.words !== 'trt1').map((c) => c.value)
    const narrowed = await ask({ region: DISTRICT, tractor: ids.join('|') })
    expect(narrowed.analysis?.design.treatments).toEqual(['ctrl', 'trt2'])
    const alone = await ask({ region: DISTRICT, tractor: ids[0]! })
    expect(alone.analysis).toBeNull()
    expect(alone.whyNot).toBe('A comparison needs two of tractor; there is one.')
    const none = await ask({ region: DISTRICT, season: 'Dec 1999–Feb 2000' })
    expect(none.runs).toEqual([])
    expect(none.whyNot).toBe('No run of this choice has the figure.')
  })

  it('leave out a run with a reason, show it, and take it back', async () => {
    const before = await ask({ region: DISTRICT })
    const { number } = before.runs[0]!
    const out = await analyst.post('/comparisons/exclusions', { number, reason: 'it rained into the jar' })
    expect(out.status).toBe(200)
    const without = await ask({ region: DISTRICT })
    expect(without.analysis?.design.n).toBe(29)
    expect(without.runs).toHaveLength(30)
    expect(without.runs[0]).toMatchObject({ number, excluded: true })
    expect(without.runs[0]!.leftOut).toContain('“it rained into the jar”')
    expect((await analyst.post('/comparisons/exclusions', { number, reason: 'once more' })).status).toBe(409)

    await analyst.post('/comparisons/exclusions/take-back', { number, reason: 'it rained elsewhere' })
    expect((await ask({ region: DISTRICT })).analysis).toEqual(before.analysis)
    const { lines } = exclusionLogSchema.parse((await analyst.get('/comparisons/exclusions')).body)
    expect(lines.slice(0, 2).map(({ act, reason }) => [act, reason])).toEqual([
      ['taken back', 'it rained elsewhere'],
      ['left out', 'it rained into the jar'],
    ])
  })

  it('leave out a challenged record, and say so', async () => {
    const { runs } = await ask({ region: DISTRICT })
    const { number } = runs.at(-1)!
    await analyst.post(`/records/${number}/challenge`, { reason: 'too good to be true' })
    const { runs: after } = await ask({ region: DISTRICT })
    expect(after.at(-1)?.leftOut).toBe('challenged: its sheet is at the desk again')
  })

  it('refuse to leave out a record that is not there', async () => {
    expect((await analyst.post('/comparisons/exclusions', { number: 999_999, reason: 'nothing' })).status).toBe(404)
  })

  it('keep their log: the application can add to it and change nothing', async () => {
    for (const sql of ["UPDATE exclusions SET reason = 'other'", 'DELETE FROM exclusions'])
      await expect(server.deps.source.query(sql), sql).rejects.toThrow(/can only be added to/)
  })
})

describe('two tractors on the same six plots', () => {
  const DISTRICT = 'Hills'

  beforeAll(async () => {
    const { place, kit, implement, tractors } = await machines(['Tarn A', 'Tarn B'], DISTRICT)
    const shared = { implementId: implement.id, kitId: kit.id, runs: 1 }
    for (const plot of [5, 4, 3, 2, 1, 0]) {
      const planned = await demonstrator.post('/demonstrations', {
        heldOn: day(plot),
        placeId: place.id,
        demonstratorId: demonstrator.user.id,
        driver: 'S. Dolm',
        farmer: { name: 'Matis Orrel', phone: '' },
        trials: tractors.map((tractor) => ({ ...shared, tractorId: tractor.id, plot: `K${plot + 1}` })),
      })
      const { trials } = planned.body as Demonstration
      for (const [i, trial] of trials.entries()) {
        const l_per_ha = Object.values(SIX_PLOTS)[i]![plot]!
        const readings = {
          ...burning(Math.round(l_per_ha * 270)),
          trial_date: day(plot),
          demonstrator_id: demonstrator.user.number,
          place_id: place.number,
          kit_id: kit.number,
          implement_id: implement.number,
          tractor_id: trial.tractor.number,
        }
        await enterRun(server, clerk, { sender: demonstrator.user.id, readings, sheetCode: trial.runs[0]!.sheetCode! })
      }
    }
  }, 180_000)

  it('are paired by their plots and give R’s paired t, with the sentence that may be said', async () => {
    const { analysis, claim, beside, runU } = await ask({ region: DISTRICT, gap: '1' })
    expect(analysis?.design).toMatchObject({ kind: 'paired', block: 'plot', treatments: ['Tarn A', 'Tarn B'], n: 12 })
    const [test] = analysis!.tests
    // Computed in R: t 4.382299, df 5, p 0.0071392, interval 0.358295 to 1.375039, 5 pairs for a gap of 1.0.
    expect(test!.t).toBeCloseTo(4.382299, 6)
    expect(test!.p).toBeCloseTo(0.0071392, 7)
    expect(test!.interval[0]).toBeCloseTo(0.358295, 6)
    expect(test!.interval[1]).toBeCloseTo(1.375039, 6)
    expect(beside.map((b) => b.key)).toEqual(['depth_mean_cm', 'ml_per_m3', 'l_per_h'])
    expect(runU).toBeLessThan(0.866)
    expect(claim.may).toBe(true)
    expect(claim.before).toMatch(/^On 6 paired plots at .*, ploughing, 15\.2 cm deep against 15\.2 cm, Tarn B used$/)
    expect(claim.figure).toBe('0.9 ± 0.5')
    expect(claim.after).toBe('L/ha less than Tarn A.')
  })

  it('compare another figure on the same footing', async () => {
    const { analysis, unit, claim } = await ask({ region: DISTRICT, figure: 'depth_mean_cm' })
    expect(unit).toBe('cm')
    // Every golden run is as deep as the other: no spread, and it says so.
    expect(analysis).toBeNull()
    expect(claim.may).toBe(false)
  })
})
