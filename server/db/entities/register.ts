import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'
import type { Operation, Tractor } from '../../../shared/schemas/register.ts'

/** Where demonstrations are held. */
@Entity({ name: 'places' })
export class PlaceEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  district!: string

  @Column({ type: 'double precision', nullable: true })
  lat!: number | null

  @Column({ type: 'double precision', nullable: true })
  lon!: number | null

  @Column({ type: 'double precision', nullable: true })
  density15_kgm3!: number | null

  @Column({ type: 'boolean' })
  active!: boolean

  @Column({ type: 'integer' })
  version!: number
}

/** What the rules must know of a tractor. */
@Entity({ name: 'tractors' })
export class TractorEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  serial!: string

  @Column({ type: 'double precision' })
  ratedPower_kw!: number

  @Column({ type: 'double precision' })
  ptoPower_kw!: number

  @Column({ type: 'integer' })
  ratedRpm!: number

  @Column({ type: 'text' })
  drive!: Tractor['drive']

  @Column({ type: 'text' })
  hourMeterKind!: Tractor['hourMeterKind']

  @Column({ type: 'text' })
  tyreFront!: string

  @Column({ type: 'text' })
  tyreRear!: string

  @Column({ type: 'double precision', nullable: true })
  rollingCircumference_m!: number | null

  @Column({ type: 'text', default: '' })
  gearSpeeds!: string

  @Column({ type: 'double precision' })
  ballastFront_kg!: number

  @Column({ type: 'double precision' })
  ballastRear_kg!: number

  @Column({ type: 'boolean' })
  active!: boolean

  @Column({ type: 'integer' })
  version!: number
}

/** What the rules must know of an implement. */
@Entity({ name: 'implements' })
export class ImplementEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  operation!: Operation

  @Column({ type: 'double precision' })
  ratedWidth_m!: number

  @Column({ type: 'integer' })
  toolCount!: number

  @Column({ type: 'double precision' })
  maxDepth_cm!: number

  @Column({ type: 'boolean' })
  active!: boolean

  @Column({ type: 'integer' })
  version!: number
}

/** A measuring kit: its marks and capacity are read by the rules, nothing is fixed in code. */
@Entity({ name: 'kits' })
export class KitEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  jarSerial!: string

  @Column({ type: 'integer' })
  jarCapacity_ml!: number

  @Column({ type: 'integer' })
  jarMark_ml!: number

  @Column({ type: 'text' })
  jugSerial!: string

  @Column({ type: 'integer' })
  jugCapacity_ml!: number

  @Column({ type: 'integer' })
  jugMark_ml!: number

  @Column({ type: 'text' })
  tapeSerial!: string

  @Column({ type: 'text' })
  gaugeSerial!: string

  @Column({ type: 'double precision' })
  ruleLength_cm!: number

  @Column({ type: 'double precision', nullable: true })
  scale_pct!: number | null

  @Column({ type: 'date' })
  checkedOn!: string

  @Column({ type: 'boolean' })
  active!: boolean

  @Column({ type: 'integer' })
  version!: number
}
