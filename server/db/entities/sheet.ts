import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'
import type { SheetState } from '../../../shared/schemas/sheet.ts'

/** One page that records one run. `version` counts writes: every update names the one it was made on. */
@Entity({ name: 'sheets' })
export class SheetEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'text', nullable: true })
  code!: string | null

  @Column({ type: 'text', nullable: true })
  layoutKey!: string | null

  @Column({ type: 'integer', nullable: true })
  layoutVersion!: number | null

  @Column({ type: 'boolean' })
  planned!: boolean

  @Column({ type: 'uuid', nullable: true })
  runId!: string | null

  @Column({ type: 'text' })
  state!: SheetState

  @Column({ type: 'text', nullable: true })
  origin!: 'photo' | 'spreadsheet' | 'keyed' | null

  @Column({ type: 'uuid', nullable: true })
  ownerId!: string | null

  @Column({ type: 'jsonb' })
  facts!: Record<string, unknown>

  @Column({ type: 'integer' })
  openDoubts!: number

  @Column({ type: 'integer' })
  stops!: number

  @Column({ type: 'text', nullable: true })
  firstDoubt!: string | null

  @Column({ type: 'uuid', nullable: true })
  heldBy!: string | null

  @Column({ type: 'timestamptz', nullable: true })
  heldSince!: Date | null

  @Column({ type: 'timestamptz', nullable: true })
  heldUntil!: Date | null

  @Column({ type: 'text', nullable: true })
  sentBackReason!: string | null

  @Column({ type: 'text', nullable: true })
  reason!: string | null

  @Column({ type: 'boolean' })
  answered!: boolean

  @Column({ type: 'timestamptz', nullable: true })
  arrivedAt!: Date | null

  @Column({ type: 'timestamptz', nullable: true })
  enteredAt!: Date | null

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date

  @Column({ type: 'integer' })
  version!: number
}
