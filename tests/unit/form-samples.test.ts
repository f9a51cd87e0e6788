import { readFile } from 'node:fs/promises'
import { expect, it } from 'vitest'
import { z } from 'zod'
import { valueSchema } from '../../shared/schemas/sheet.ts'
import type { SpreadsheetReading } from '../../worker/readers/spreadsheet/block.ts'
import { readCsv } from '../../worker/readers/spreadsheet/csv.ts'
import { readXlsx } from '../../worker/readers/spreadsheet/xlsx.ts'
import { expectedSchema } from '../simulator/expected.ts'
import { toExpectedForm } from '../simulator/expected-form.ts'

const truthSchema = z.array(z.object({ readings: z.record(z.string(), valueSchema), spoiled: z.array(z.string()) }))

const CASES: Array<[string, string, (bytes: Uint8Array) => SpreadsheetReading | Promise<SpreadsheetReading>]> = [
  ['form-xlsx', 'a workbook: one clean run, one typed by habit', 'form-xlsx.xlsx', readXlsx],
  ['form-csv', 'a CSV with semicolons and decimal commas', 'form-csv.csv', readCsv],
].map(([name, why, file, read]) => [`${name}: ${why}`, `samples/${name}/${file}`, read]) as typeof CASES

it.each(CASES)('%s', async (_, path, read) => {
  const folder = path.slice(0, path.lastIndexOf('/'))
  const runs = toExpectedForm(await read(new Uint8Array(await readFile(path))))
  expect(runs).toEqual(expectedSchema.parse(JSON.parse(await readFile(`${folder}/expected.json`, 'utf8'))))
  const truths = truthSchema.parse(JSON.parse(await readFile(`${folder}/${folder.split('/')[1]}.truth.json`, 'utf8')))
  expect(runs).toHaveLength(truths.length)
  for (const [i, truth] of truths.entries()) {
    for (const [key, { state, value }] of Object.entries(runs[i]!.readings)) {
      const spoiled = truth.spoiled.includes(key)
      expect({ key, state }).toEqual({ key, state: spoiled ? 'in doubt' : 'clear' })
      if (!spoiled) expect({ key, value }).toEqual({ key, value: truth.readings[key] })
    }
  }
})
