import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'
import type { Role } from '../../../shared/schemas/user.ts'

/** Somebody who signs in. */
@Entity({ name: 'users' })
export class UserEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'text' })
  name!: string

  @Column({ type: 'text' })
  email!: string

  @Column({ type: 'text' })
  role!: Role

  @Column({ type: 'text', nullable: true })
  passwordHash!: string | null

  @Column({ type: 'boolean' })
  active!: boolean

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date
}

/** A one-time link; only the hash of its token is kept. */
@Entity({ name: 'user_links' })
export class UserLinkEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid', nullable: true })
  userId!: string | null

  @Column({ type: 'text' })
  kind!: 'invitation' | 'reset' | 'first admin'

  @Column({ type: 'text' })
  tokenHash!: string

  @Column({ type: 'timestamptz' })
  expiresAt!: Date

  @Column({ type: 'timestamptz', nullable: true })
  usedAt!: Date | null

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date
}
