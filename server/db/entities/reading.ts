import { Column, Entity, PrimaryColumn, PrimaryGeneratedColumn } from 'typeorm'
import type { Candidate, Origin, Reading, Settlement, Severity, Value } from '../../../shared/schemas/sheet.ts'

/** A value with unit, origin and settlement; what changed it stands in the trail. */
@Entity({ name: 'readings' })
export class ReadingEntity {
  @PrimaryColumn({ type: 'uuid' })
  sheetId!: string

  @PrimaryColumn({ type: 'text' })
  key!: string

  @Column({ type: 'jsonb', nullable: true })
  value!: Value | null

  @Column({ type: 'jsonb', nullable: true })
  readValue!: Value | null

  @Column({ type: 'text', nullable: true })
  unit!: string | null

  @Column({ type: 'text' })
  state!: 'clear' | 'in doubt'

  @Column({ type: 'text' })
  origin!: Origin

  @Column({ type: 'jsonb' })
  candidates!: Candidate[]

  @Column({ type: 'jsonb' })
  reasons!: Reading['reasons']

  @Column({ type: 'uuid', nullable: true })
  pageId!: string | null

  @Column({ type: 'text', nullable: true })
  cellRef!: string | null

  @Column({ type: 'text', nullable: true })
  settlement!: Settlement | null

  @Column({ type: 'uuid', nullable: true })
  settledBy!: string | null

  @Column({ type: 'timestamptz', nullable: true })
  settledAt!: Date | null

  @Column({ type: 'text', nullable: true })
  why!: string | null
}

/** A finding of a rule on a sheet. `standing` is false once the numbers no longer bear it out. */
@Entity({ name: 'doubts' })
export class DoubtEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid' })
  sheetId!: string

  @Column({ type: 'text' })
  fingerprint!: string

  @Column({ type: 'text' })
  rule!: string

  @Column({ type: 'integer' })
  ruleVersion!: number

  @Column({ type: 'text' })
  severity!: Severity

  @Column({ type: 'text', array: true })
  cells!: string[]

  @Column({ type: 'text' })
  text!: string

  @Column({ type: 'jsonb' })
  compared!: Record<string, number | string | null>

  @Column({ type: 'integer' })
  position!: number

  @Column({ type: 'boolean' })
  standing!: boolean

  @Column({ type: 'uuid', nullable: true })
  settledBy!: string | null

  @Column({ type: 'timestamptz', nullable: true })
  settledAt!: Date | null

  @Column({ type: 'text', nullable: true })
  why!: string | null
}
