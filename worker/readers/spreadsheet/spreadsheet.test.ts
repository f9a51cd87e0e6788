import exceljs from 'exceljs'
import { describe, expect, it } from 'vitest'
import { writeDictionary } from '../../../server/print/dictionary.ts'
import { writeFormCsv } from '../../../server/print/form-csv.ts'
import { writeFormXlsx } from '../../../server/print/form-xlsx.ts'
import { csvHeading, FORM_COLUMNS, FORM_HEAD, FORM_SHEET, formRows } from '../../../shared/layouts/form.ts'
import { tillage1 } from '../../../shared/layouts/tillage-1.ts'
import { type Block, blockSchema, type SpreadsheetReading } from './block.ts'
import { readCsv } from './csv.ts'
import { readXlsx } from './xlsx.ts'

const CODE = '7K4QM2K9TA'

/** Opens the printed form, lets `fill` type into it, and reads it back. `put('depth_cm[3]', value, run)` types one value. */
async function fillAndRead(
  fill: (put: (key: string, value: exceljs.CellValue, run?: number) => exceljs.Cell, sheet: exceljs.Worksheet) => void,
): Promise<SpreadsheetReading> {
  const workbook = new exceljs.Workbook()
  await workbook.xlsx.load((await writeFormXlsx(tillage1)).buffer as ArrayBuffer)
  const sheet = workbook.getWorksheet(FORM_SHEET)!
  fill((key, value, run = 1) => {
    const row = [...Array(sheet.rowCount).keys()].find((i) => sheet.getCell(i + 1, FORM_COLUMNS.key).value === key)
    const cell = sheet.getCell(row! + 1, FORM_COLUMNS.firstValue + run - 1)
    cell.value = value
    return cell
  }, sheet)
  return readXlsx(new Uint8Array((await workbook.xlsx.writeBuffer()) as ArrayBuffer))
}

function blocksOf(reading: SpreadsheetReading): Block[] {
  if (reading.kind !== 'blocks') throw new Error(reading.reason)
  return reading.blocks.map((block) => blockSchema.parse(block))
}

const first = async (fill: Parameters<typeof fillAndRead>[0]) => blocksOf(await fillAndRead(fill))[0]!

describe('the workbook form', () => {
  it('comes back as it was filled in, each value with the cell it came from', async () => {
    const blocks = blocksOf(
      await fillAndRead((put) => {
        put('trial_date', new Date(Date.UTC(2026, 4, 14)))
        put('tractor_id', 27)
        put('jar_start_ml', 4800)
        put('depth_cm[3]', 15.5)
        put('t_start', new Date(Date.UTC(1899, 11, 30, 9, 10)))
        put('vent_open', 'yes')
        put('air_bled', 'no')
        put('area_unit', 'ha')
        put('consent_trial', 'yes')
        put('remarks', 'stones, "north" side')
        put('jar_start_ml', 3000, 4)
      }),
    )
    expect(blocks.map((block) => [block.number, block.layout, block.version, block.sheetCode])).toEqual([
      [1, 'tillage', 1, null],
      [2, 'tillage', 1, null],
    ])
    const values = Object.fromEntries(Object.entries(blocks[0]!.values).map(([key, { value }]) => [key, value]))
    expect(values).toMatchObject({
      trial_date: '2026-05-14',
      tractor_id: 27,
      jar_start_ml: 4800,
      'depth_cm[3]': 15.5,
      t_start: '09:10',
      vent_open: true,
      air_bled: false,
      area_unit: 'ha',
      consent_trial: 'yes',
      remarks: 'stones, "north" side',
      jar_end_ml: null,
    })
    expect(blocks[0]!.values.jar_start_ml).toMatchObject({ unit: 'mL', state: 'clear', raw: '4800' })
    expect(blocks[0]!.values.jar_start_ml!.cellRef).toMatch(/^Runs!D\d+$/)
    expect(blocks[1]!.values.jar_start_ml!.cellRef).toMatch(/^Runs!G\d+$/)
    expect(Object.values(blocks[0]!.values).filter((value) => value.state === 'in doubt')).toEqual([])
    expect(blocks[0]!.problems).toEqual([])
  })

  it('has a row for every cell of the sheet but signatures and names', () => {
    const left = tillage1.cells.filter((cell) => !formRows(tillage1).some((row) => row.key === cell.key)).map((cell) => cell.key)
    expect(left).toEqual(['circuit_restored_by', 'sign_demonstrator', 'sign_operator', 'sign_farmer', 'sign_witness'])
  })

  it('without a value typed is not taken in', async () => {
    expect(await fillAndRead(() => undefined)).toMatchObject({
      kind: 'not a form',
      reason: expect.stringMatching(/our form, but no run is filled in\. Nothing was kept\. Fill in a column from D on/),
    })
  })

  it('takes a decimal comma typed as text once the head declares it', async () => {
    const block = await first((put) => {
      put(FORM_HEAD.decimalMark, ',')
      put('depth_cm[1]', '15,5')
      put('depth_cm[2]', '15.5')
    })
    expect(block.values['depth_cm[1]']).toMatchObject({ value: 15.5, state: 'clear' })
    expect(block.values['depth_cm[2]']).toMatchObject({ value: null, state: 'in doubt', raw: '15.5' })
  })

  it('doubts a number that can mean two things, and offers both', async () => {
    const block = await first((put) => put('jar_start_ml', '4,800'))
    expect(block.values.jar_start_ml).toMatchObject({ value: null, state: 'in doubt', raw: '4,800' })
    expect(block.values.jar_start_ml!.candidates.map((c) => c.value)).toEqual([4.8, 4800])
    expect(block.values.jar_start_ml!.reasons[0]!.text).toContain('can mean 4.8 or 4800')
  })

  it.each<[string, exceljs.CellValue, unknown, string]>([
    ['depth_cm[1]', 'about 15', null, 'a number in cm belongs there'],
    ['depth_cm[1]', '152 mm', null, 'the unit "mm" is typed'],
    ['depth_cm[1]', 15.25, 15.25, "more places than the sheet's 99.9"],
    ['depth_cm[1]', -3, -3, 'below zero'],
    ['jar_start_ml', 48_000, 48_000, 'larger than'],
    ['depth_cm[1]', new Date(Date.UTC(2026, 4, 1)), null, 'a date or a clock time'],
    ['t_start', '25:10', null, 'a clock time such as'],
    ['t_start', 24, null, 'a clock time such as'],
    ['trial_date', '05/04/2026', null, 'can mean 2026-04-05 or 2026-05-04'],
    ['trial_date', '31-02-2026', null, 'a date such as'],
    ['vent_open', 'maybe', null, 'one of yes, no'],
    ['area_unit', 'hectare?', null, 'one of ha, acre'],
    ['depth_cm[1]', { error: '#DIV/0!' } as exceljs.CellErrorValue, null, 'could not calculate'],
    ['depth_cm[1]', { formula: 'D3+1', date1904: false }, null, 'saved without its value'],
  ])('keeps %s = %j, and doubts it', async (key, typed, value, text) => {
    const block = await first((put) => {
      const cell = put(key, typed)
      // A spreadsheet program shows what it took for a date as one.
      if (typed instanceof Date) cell.numFmt = 'd mmm'
    })
    expect(block.values[key]).toMatchObject({ value, state: 'in doubt' })
    expect(block.values[key]!.raw).not.toBeNull()
    expect(block.values[key]!.reasons[0]!.text).toContain(text)
  })

  it.each<[string, exceljs.CellValue, unknown]>([
    ['depth_cm[1]', { formula: 'AVERAGE(15,16)', result: 15.5, date1904: false }, 15.5],
    // 0.1 + 0.2 in binary: the places past the sheet's are no reading.
    ['depth_cm[1]', 15.1 + 0.2, 15.3],
    ['depth_cm[1]', '15.2 cm', 15.2],
    ['tyre_p_fl', 1.9, 1.9],
    ['t_start', '9:05', '09:05'],
    ['t_start', 9.5 / 24, '09:30'],
    ['trial_date', '14-05-2026', '2026-05-14'],
    ['trial_date', 46_156, '2026-05-14'],
    ['trial_date', '14/05/2026', '2026-05-14'],
    ['vent_open', true, true],
    ['soil_class', 'Fine', 'fine'],
    ['fuel_method', 'difference', 'D'],
  ])('takes %s = %j as %j', async (key, typed, value) => {
    const block = await first((put) => put(key, typed))
    expect(block.values[key]).toMatchObject({ value, state: 'clear' })
  })

  it('doubts the values of a row whose unit was changed', async () => {
    const block = await first((put, sheet) => {
      const cell = put('depth_cm[1]', 152)
      sheet.getCell(Number(cell.row), FORM_COLUMNS.unit).value = 'mm'
    })
    expect(block.values['depth_cm[1]']!.reasons.map((reason) => reason.text).join()).toContain('unit was changed to "mm"')
  })

  it('finds its rows again after some were inserted', async () => {
    const block = await first((put, sheet) => {
      put('jar_start_ml', 4800)
      sheet.insertRow(4, ['my own note'])
    })
    expect(block.values.jar_start_ml).toMatchObject({ value: 4800, state: 'clear' })
  })

  it('doubts a value that spreads over merged cells, since two runs would get it', async () => {
    const blocks = blocksOf(
      await fillAndRead((put, sheet) => {
        const cell = put('jar_start_ml', 4800)
        sheet.mergeCells(Number(cell.row), FORM_COLUMNS.firstValue, Number(cell.row), FORM_COLUMNS.firstValue + 1)
      }),
    )
    expect(blocks.map((block) => block.values.jar_start_ml!.state)).toEqual(['clear', 'in doubt'])
  })

  it('leaves the head to the plan when a printed code is given, and says when a code is mistyped', async () => {
    const { checkCharacter } = await import('../../../shared/layouts/sheet-code.ts')
    const good = CODE + checkCharacter(CODE)
    const blocks = blocksOf(
      await fillAndRead((put) => {
        put(FORM_HEAD.sheetCode, `${good.slice(0, 5)}-${good.slice(5, 10)}-${good.slice(10)}`)
        put('jar_start_ml', 4800)
        put(FORM_HEAD.sheetCode, `${CODE}${good.endsWith('0') ? '1' : '0'}`, 2)
      }),
    )
    expect(blocks[0]).toMatchObject({ sheetCode: good, planned: true })
    expect(Object.keys(blocks[0]!.values)).not.toContain('trial_date')
    expect(blocks[1]).toMatchObject({ sheetCode: null, planned: false, problems: [expect.stringContaining('mistyped')] })
  })
})

/** Types `values` into the CSV form; text goes in as RFC 4180 wants it. */
function csvWith(values: Record<string, string>, separator = ','): Uint8Array {
  const rows = formRows(tillage1)
  const heading = ['layout', 'version', 'decimal_mark', 'sheet_code', ...rows.map(csvHeading)]
  const quote = (text: string) => (/[",;\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text)
  const line = ['tillage', '1', values.decimal_mark ?? '.', '', ...rows.map((row) => quote(values[row.key] ?? ''))]
  return new TextEncoder().encode(`${heading.join(separator)}\r\n${line.join(separator)}\r\n`)
}

describe('the CSV form', () => {
  it('states every key with its unit, and comes back as it was filled in', () => {
    expect(writeFormCsv(tillage1).split('\r\n')[0]).toContain('jar_start_ml [mL]')
    const [block] = blocksOf(
      readCsv(csvWith({ jar_start_ml: '4800', t_start: '09:10', vent_open: 'yes', trial_date: '2026-05-14' })),
    )
    expect(block!.values.jar_start_ml).toMatchObject({
      value: 4800,
      unit: 'mL',
      cellRef: expect.stringMatching(/^row 2, column \d+$/),
    })
    expect(block!.values).toMatchObject({
      t_start: { value: '09:10' },
      vent_open: { value: true },
      trial_date: { value: '2026-05-14' },
    })
  })

  it('without a value typed is not taken in', () => {
    expect(readCsv(new TextEncoder().encode(writeFormCsv(tillage1)))).toMatchObject({
      reason: expect.stringContaining('This is our form, but no run is filled in.'),
    })
  })

  // RFC 4180, section 2, rules 5 to 7: fields in quotes may hold commas, line breaks and doubled quotes; rule 2: the last line
  // may lack its break.
  it.each([
    ['a comma', 'stones, north side'],
    ['a doubled quote', 'the "north" side'],
    ['a line break', 'stones\r\nnorth side'],
  ])('keeps %s inside quotes (RFC 4180)', (_, remarks) => {
    const [block] = blocksOf(readCsv(csvWith({ jar_start_ml: '4800', remarks })))
    expect(block!.values.remarks!.value).toBe(remarks)
  })

  it('takes a last line without its break (RFC 4180, rule 2), a byte order mark, and UTF-16', () => {
    const text = new TextDecoder().decode(csvWith({ jar_start_ml: '4800' })).trimEnd()
    const utf16 = Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(text, 'utf16le')])
    for (const bytes of [Buffer.from(text), Buffer.from(`\ufeff${text}`), utf16])
      expect(blocksOf(readCsv(bytes))[0]!.values.jar_start_ml!.value).toBe(4800)
  })

  it('takes semicolons with a declared decimal comma', () => {
    const [block] = blocksOf(readCsv(csvWith({ decimal_mark: ',', 'depth_cm[1]': '15,5' }, ';')))
    expect(block!.values['depth_cm[1]']).toMatchObject({ value: 15.5, state: 'clear' })
  })

  it('loses nothing of a row that is longer than the heading', () => {
    const bytes = Buffer.concat([Buffer.from(csvWith({ jar_start_ml: '4800' })).subarray(0, -2), Buffer.from(',left over\r\n')])
    expect(blocksOf(readCsv(bytes))[0]!.problems.join()).toContain('left over')
  })

  it('of somebody else is refused with what to do', () => {
    const reading = readCsv(new TextEncoder().encode('name,price\r\nplough,12\r\n'))
    expect(reading).toMatchObject({ kind: 'not a form', reason: expect.stringContaining('Take a fresh form') })
  })

  it('of a layout nobody knows is refused by name', () => {
    const text = new TextDecoder().decode(csvWith({ jar_start_ml: '4800' })).replace('tillage,1', 'sowing,9')
    expect(readCsv(new TextEncoder().encode(text))).toMatchObject({ reason: expect.stringContaining('"sowing" version 9') })
  })
})

describe('the data dictionary', () => {
  it('has one line a reading, with unit, format and limits', () => {
    const lines = writeDictionary(tillage1).trimEnd().split('\r\n')
    expect(lines).toHaveLength(formRows(tillage1).length + 1)
    expect(lines.find((line) => line.startsWith('depth_cm[1],'))).toBe(
      'depth_cm[1],depth 1,number,cm,99.9,,mandatory,steel rule,0.5,80,5,60',
    )
  })
})
