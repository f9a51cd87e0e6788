import { Column, Entity, PrimaryColumn } from 'typeorm'

/** A line of the audit trail: the database refuses to change or delete it. */
@Entity({ name: 'trail' })
export class TrailEntity {
  @PrimaryColumn({ type: 'bigint' })
  id!: number

  @Column({ type: 'timestamptz', insert: false })
  at!: Date

  @Column({ type: 'uuid', nullable: true })
  actorId!: string | null

  @Column({ type: 'text' })
  who!: string

  @Column({ type: 'text' })
  action!: string

  @Column({ type: 'text' })
  subject!: string

  @Column({ type: 'uuid', nullable: true })
  subjectId!: string | null

  @Column({ type: 'text', nullable: true })
  key!: string | null

  @Column({ type: 'text' })
  text!: string

  @Column({ type: 'jsonb' })
  details!: Record<string, unknown>

  @Column({ type: 'text', nullable: true })
  previousHash!: string | null

  @Column({ type: 'text' })
  hash!: string
}
