import { randomUUID } from 'node:crypto'
import type { DataSource } from '../../server/db/database.ts'
import { ImplementEntity, KitEntity, PlaceEntity, TractorEntity } from '../../server/db/entities/register.ts'
import { PageEntity, UploadEntity } from '../../server/db/entities/upload.ts'
import type { PageOutcome, ReadReading } from '../../server/db/intake/page-outcome.ts'
import { takeInPage } from '../../server/db/intake/take-in-page.ts'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { buildReadings } from './readings.ts'

/** The registers that the golden sheet names: tractor 12, implement 31, kit 4, place 21. */
export async function createGoldenRegisters(source: DataSource): Promise<void> {
  const db = source.manager
  await db.upsert(PlaceEntity, { number: 21, name: 'Aspalli', district: 'Sannipur' }, ['number'])
  await db.upsert(
    TractorEntity,
    {
      number: 12,
      name: 'Tarnfold 45',
      serial: 'TF45-0113',
      ratedPower_kw: 37,
      ptoPower_kw: 32,
      ratedRpm: 2200,
      drive: '2WD',
      hourMeterKind: 'electronic',
    },
    ['number'],
  )
  await db.upsert(
    ImplementEntity,
    { number: 31, name: 'plough, 3 bottoms', operation: 'plough', ratedWidth_m: 0.9, toolCount: 3, maxDepth_cm: 28 },
    ['number'],
  )
  await db.upsert(
    KitEntity,
    {
      number: 4,
      name: 'kit 4',
      jarSerial: 'J-031',
      jarCapacity_ml: 5000,
      jarMark_ml: 200,
      jugSerial: 'G-112',
      jugCapacity_ml: 1000,
      jugMark_ml: 100,
      checkedOn: '2026-06-02',
    },
    ['number'],
  )
}

/** Readings as a reader would hand them over, in layout order; `doubtful` marks some as in doubt with their candidates. */
export function readingsOf(values: Readings, doubtful: Record<string, ReadReading['candidates']> = {}): ReadReading[] {
  return tillage1.cells
    .filter((cell) => values[cell.key] !== undefined)
    .map((cell) => ({
      key: cell.key,
      value: values[cell.key] ?? null,
      unit: 'unit' in cell ? cell.unit : null,
      state: doubtful[cell.key] ? 'in doubt' : 'clear',
      candidates: doubtful[cell.key] ?? [],
      reasons: [],
      cellRef: null,
    }))
}

export const buildOutcome = (changes: Partial<Extract<PageOutcome, { kind: 'read' }>> = {}): PageOutcome => ({
  kind: 'read',
  layout: 'tillage',
  layoutVersion: 1,
  planned: false,
  sheetCode: makeSheetCode((below) => Math.floor(Math.random() * below)),
  origin: 'photo',
  readings: readingsOf(buildReadings({ demonstrator_id: null })),
  ...changes,
})

/** A page of a fresh upload, with an attempt in hand. */
export async function createPage(
  source: DataSource,
  uploadedBy: string,
  changes: Partial<UploadEntity> = {},
): Promise<{ pageId: string; attemptToken: string }> {
  const db = source.manager
  const upload = await db.insert(UploadEntity, {
    uploadedBy,
    fileName: 'sheet.jpg',
    kind: 'jpeg',
    bytes: 1000,
    sha256: randomUUID(),
    state: 'being read',
    ...changes,
  })
  const attemptToken = randomUUID()
  const page = await db.insert(PageEntity, {
    uploadId: upload.identifiers[0]!.id as string,
    number: 1,
    state: 'being read',
    attemptToken,
    attempts: 1,
  })
  return { pageId: page.identifiers[0]!.id as string, attemptToken }
}

/** A sheet as it stands after a page was read. */
export async function createArrivedSheet(
  source: DataSource,
  uploadedBy: string,
  outcome: PageOutcome = buildOutcome(),
): Promise<string> {
  const page = await createPage(source, uploadedBy)
  const taken = await source.transaction((db) => takeInPage(db, { ...page, outcome }))
  if (!taken.sheetId) throw new Error('the page was not taken in')
  return taken.sheetId
}
