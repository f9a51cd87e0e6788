import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'

/** What the product wrote to somebody; the admin reads it in the outbox. */
@Entity({ name: 'mails' })
export class MailEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'text' })
  recipient!: string

  @Column({ type: 'text' })
  subject!: string

  @Column({ type: 'text' })
  body!: string

  @Column({ type: 'text' })
  state!: 'queued' | 'sent' | 'failed'

  @Column({ type: 'text', nullable: true })
  error!: string | null

  @Column({ type: 'timestamptz', insert: false })
  createdAt!: Date

  @Column({ type: 'timestamptz', nullable: true })
  sentAt!: Date | null
}
