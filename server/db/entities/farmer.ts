import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'

/** Kept apart from everything else: withdrawing consent removes the row. */
@Entity({ name: 'farmers' })
export class FarmerEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  phone!: string

  /** Where the leaf goes; empty where none was given. */
  @Column({ type: 'text', default: '' })
  email!: string

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date
}
