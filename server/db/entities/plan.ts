import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'

/** A day at a place. */
@Entity({ name: 'demonstrations' })
export class DemonstrationEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'date' })
  heldOn!: string

  @Column({ type: 'uuid' })
  placeId!: string

  @Column({ type: 'uuid' })
  demonstratorId!: string

  @Column({ type: 'text' })
  driver!: string

  @Column({ type: 'uuid', nullable: true })
  farmerId!: string | null

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date

  @Column({ type: 'integer' })
  version!: number
}

/** One tractor with one implement on one plot. */
@Entity({ name: 'trials' })
export class TrialEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid' })
  demonstrationId!: string

  @Column({ type: 'integer' })
  position!: number

  @Column({ type: 'uuid' })
  tractorId!: string

  @Column({ type: 'uuid' })
  implementId!: string

  @Column({ type: 'uuid' })
  kitId!: string

  @Column({ type: 'text' })
  plot!: string
}

/** One timed working of a trial, on one sheet. */
@Entity({ name: 'runs' })
export class RunEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid' })
  trialId!: string

  @Column({ type: 'integer' })
  number!: number
}
