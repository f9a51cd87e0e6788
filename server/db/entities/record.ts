import { Column, Entity, PrimaryColumn } from 'typeorm'
import type { RecordRow, ResultValue } from '../../../shared/schemas/record.ts'
import type { Doubt, Reading } from '../../../shared/schemas/sheet.ts'

/** A version of a record of the trial book; versions are added, none is overwritten. */
@Entity({ name: 'records' })
export class RecordEntity {
  @PrimaryColumn({ type: 'integer' })
  number!: number

  @PrimaryColumn({ type: 'integer' })
  version!: number

  @Column({ type: 'uuid' })
  sheetId!: string

  @Column({ type: 'text' })
  state!: RecordRow['state']

  @Column({ type: 'date', nullable: true })
  trialDate!: string | null

  @Column({ type: 'uuid', nullable: true })
  placeId!: string | null

  @Column({ type: 'uuid', nullable: true })
  demonstratorId!: string | null

  @Column({ type: 'uuid', nullable: true })
  tractorId!: string | null

  @Column({ type: 'uuid', nullable: true })
  implementId!: string | null

  @Column({ type: 'uuid', nullable: true })
  kitId!: string | null

  @Column({ type: 'text', nullable: true })
  gear!: string | null

  @Column({ type: 'text', nullable: true })
  soilClass!: string | null

  @Column({ type: 'jsonb' })
  readings!: Reading[]

  @Column({ type: 'jsonb' })
  results!: Record<string, ResultValue>

  @Column({ type: 'jsonb' })
  notes!: Doubt[]

  @Column({ type: 'jsonb' })
  facts!: Record<string, unknown>

  @Column({ type: 'text' })
  rulesVersion!: string

  @Column({ type: 'text' })
  formulaVersion!: string

  @Column({ type: 'uuid' })
  enteredBy!: string

  @Column({ type: 'timestamptz', insert: false })
  enteredAt!: Date

  @Column({ type: 'uuid', nullable: true })
  challengedBy!: string | null

  @Column({ type: 'timestamptz', nullable: true })
  challengedAt!: Date | null

  @Column({ type: 'text', nullable: true })
  challengeReason!: string | null
}
