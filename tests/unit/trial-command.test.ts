import { spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, expect, test } from 'vitest'
import { readTrialFile } from '../../shared/checks/trial-file.ts'

const folder = mkdtempSync(join(tmpdir(), 'trial-'))
afterAll(() => rmSync(folder, { recursive: true }))

function trial(...args: string[]) {
  return spawnSync(process.execPath, ['--import', 'tsx', 'server/scripts/trial.ts', ...args], { encoding: 'utf8' })
}

function trialOf(content: unknown) {
  const file = join(folder, 'trial.json')
  writeFileSync(file, JSON.stringify(content))
  return trial(file)
}

// The golden sheet of the method, every printed digit worked out independently of this code (JCGM 100 budget).
test('prints the golden sheet, unrounded', () => {
  const { status, stdout, stderr } = trial('tests/fixtures/golden-trial.json')
  expect(stderr).toBe('')
  expect(status).toBe(0)
  const out = JSON.parse(stdout)
  expect(out.fuel_ml.value).toBe(3800)
  expect(out.fuel_ml.u).toBeCloseTo(88.2874, 4)
  expect(out.l_per_h.value).toBeCloseTo(4.384615, 6)
  expect(out.l_per_h.u).toBeCloseTo(0.107529, 6)
  expect(out.l_per_h.U).toBeCloseTo(0.215058, 6)
  expect(out.l_per_ha.value).toBeCloseTo(14.074074, 6)
  expect(out.l_per_ha.u).toBeCloseTo(0.338185, 6)
  expect(out.l_per_ha.U).toBeCloseTo(0.67637, 6)
  expect(out.l_per_acre.value).toBeCloseTo(5.695576, 6)
  expect(out.ml_per_m3.value).toBeCloseTo(9.305173, 6)
  expect(out.area_m2.value).toBe(2700)
  expect(out.tfc_ha_h.value).toBeCloseTo(0.395927, 6)
  expect(out.efc_ha_h.value).toBeCloseTo(0.311538, 6)
  expect(out.fe_pct.value).toBeCloseTo(78.6859, 4)
  expect(out.depth_mean_cm.value).toBeCloseTo(15.125, 10)
  expect(out.depth_sd_cm.value).toBeCloseTo(0.685853, 6)
  expect(out.depth_cv_pct.value).toBeCloseTo(4.5346, 4)
  expect(out.width_mean_m.value).toBeCloseTo(0.905, 10)
  expect(out.width_sd_m.value).toBeCloseTo(0.0150923, 7)
  expect(out.width_cv_pct.value).toBeCloseTo(1.6677, 4)
  expect(out.speed_km_h.value).toBeCloseTo(4.399185, 6)
  expect(out.slip_pct.value).toBeCloseTo(12.76596, 5)
  expect(out.slip_pct.u).toBeCloseTo(0.3137, 4)
  expect(out.fuel15_ml.value).toBeCloseTo(3758.1686, 4)
  expect(out.mass_kg.value).toBeCloseTo(3.126796, 6)
  expect(out.draft_n.value).toBeCloseTo(7192.97, 2)
  expect(out.drawbar_kw.value).toBeCloseTo(8.7898, 4)
  expect(out.l_per_kwh.value).toBeCloseTo(0.633953, 6)
  expect(out.expected_l_per_h.value).toBeCloseTo(4.833, 3)
  expect(out.expected_l_per_ha.value).toBeCloseTo(15.513, 3)
  expect(out.fuel_cost_per_ha.value).toBeCloseTo(1301.85, 2)
  expect(out.l_per_ha).toMatchObject({ unit: 'L/ha', k: 2, formula: 'C03', reason: null })
  expect(out.l_per_ha.budget[0]).toMatchObject({ name: 'reading the jar' })
  expect(out.l_per_ha.source).toMatch(/common practice/)
  const shares: Array<{ share: number }> = out.l_per_ha.budget
  expect(shares.reduce((sum, part) => sum + part.share, 0)).toBeCloseTo(1, 12)
})

test('names each rule that fired, with severity, cells and the numbers compared', () => {
  const { stdout } = trialOf({ readings: { jar_start_ml: 5200, jar_end_ml: 2000, vent_open: false } })
  const { rules, l_per_h, fuel_ml } = JSON.parse(stdout)
  expect(rules).toContainEqual(
    expect.objectContaining({
      id: 'Q04',
      version: 1,
      severity: 'stop',
      cells: ['jar_start_ml'],
      compared: { jar_start_ml: 5200, capacity_ml: 5000 },
    }),
  )
  expect(rules.map((rule: { id: string }) => rule.id)).toContain('Q34')
  expect(fuel_ml).toMatchObject({ value: null, U: null, reason: { code: 'stopped' } })
  expect(l_per_h.value).toBeNull()
})

test('takes facts and limits from the file', () => {
  const content = {
    readings: { jar_start_ml: 4800, jar_end_ml: 2000 },
    facts: { jarMark_ml: 100 },
    settings: { jar_lowest_ml: 2500 },
  }
  const { fuel_ml, rules } = JSON.parse(trialOf(content).stdout)
  expect(fuel_ml.budget[0].u).toBeCloseTo(100 / Math.sqrt(6), 10)
  expect(rules).toContainEqual(expect.objectContaining({ id: 'Q10', compared: { jar_end_ml: 2000, least_ml: 2500 } }))
})

test('takes a truth file as it is, blanks and all', () => {
  const truth = {
    layout: 'tillage',
    version: 1,
    sheet: 'X',
    level: 'easy',
    readings: { jar_start_ml: 4800, jar_end_ml: null, remarks: null },
    spoiled: ['jar_end_ml'],
    wrongSum: [],
  }
  const { status, stdout } = trialOf(truth)
  expect(status).toBe(0)
  expect(JSON.parse(stdout).fuel_ml.reason.code).toBe('blank')
})

test.each([
  [
    { readings: { jar_strat_ml: 4800, depth_cm: 15 } },
    /readings\.jar_strat_ml: unknown key\. readings\.depth_cm: unknown key: depth_cm\[1\]/,
  ],
  [{ readings: { jar_start_ml: '4800 mL' } }, /readings\.jar_start_ml: "4800 mL" where a number in mL is needed/],
  [{ readings: { operation: 'mowing' } }, /one of plough, disc/],
  [{ readings: {}, settings: { no_limit: 1 } }, /settings\.no_limit: unknown limit/],
  [{ readings: {}, facts: { noFact: 1 } }, /facts: unknown key noFact/],
  [{ readings: { plot_length_m: 60, side_ab_m: 61 } }, /60, but side_ab_m is 61/],
  [{ readings: {}, layout: 'knitting' }, /no layout "knitting"/],
  [[1], /expected object/],
] as const)('refuses %j and says what is wrong', (content, message) => {
  expect(() => readTrialFile(content)).toThrow(message)
})

test('prints a refusal alone, and no figure', () => {
  const { status, stdout, stderr } = trialOf({ readings: { jar_strat_ml: 4800 } })
  expect(status).toBe(2)
  expect(stdout).toBe('')
  expect(stderr).toMatch(/Nothing was computed\. readings\.jar_strat_ml: unknown key\./)
})

test('says how it is used', () => {
  expect(trial().stderr).toMatch(/usage: npm run trial -- FILE\.json/)
})

test('says which file it could not read', () => {
  expect(trial('no-such-file.json').stderr).toMatch(/no-such-file\.json cannot be read/)
})
