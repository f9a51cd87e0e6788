import { Column, Entity, PrimaryGeneratedColumn } from 'typeorm'
import type { UploadKind } from '../../../shared/schemas/upload.ts'

/** A file that came in. One that is not accepted keeps its reason, not its bytes. */
@Entity({ name: 'uploads' })
export class UploadEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid' })
  uploadedBy!: string

  @Column({ type: 'text' })
  fileName!: string

  @Column({ type: 'text', nullable: true })
  kind!: UploadKind | null

  @Column({ type: 'bigint' })
  bytes!: number

  @Column({ type: 'text' })
  sha256!: string

  @Column({ type: 'text', nullable: true })
  storageKey!: string | null

  @Column({ type: 'text' })
  state!: 'arrived' | 'being read' | 'done' | 'not accepted'

  @Column({ type: 'text', nullable: true })
  reason!: string | null

  @Column({ type: 'timestamptz', insert: false })
  receivedAt!: Date

  @Column({ type: 'uuid', nullable: true })
  forSheetId!: string | null
}

/** One page of a file. `attemptToken` fences the reading: a late attempt writes nothing. */
@Entity({ name: 'pages' })
export class PageEntity {
  @PrimaryGeneratedColumn('uuid')
  id!: string

  @Column({ type: 'uuid' })
  uploadId!: string

  @Column({ type: 'integer' })
  number!: number

  @Column({ type: 'uuid', nullable: true })
  sheetId!: string | null

  @Column({ type: 'text' })
  state!: 'arrived' | 'being read' | 'read' | 'take again' | 'unreadable'

  @Column({ type: 'uuid', nullable: true })
  attemptToken!: string | null

  @Column({ type: 'integer' })
  attempts!: number

  @Column({ type: 'jsonb', nullable: true })
  block!: Record<string, unknown> | null

  @Column({ type: 'jsonb', nullable: true })
  placed!: { layout: string; layoutVersion: number; sheetCode: string | null; corners: [number, number][] | null } | null

  @Column({ type: 'jsonb', nullable: true })
  reading!: Record<string, unknown> | null

  @Column({ type: 'jsonb', nullable: true })
  takeAgain!: { code: string; advice: string } | null

  @Column({ type: 'text', nullable: true })
  pictureKey!: string | null

  @Column({ type: 'text', nullable: true })
  problem!: string | null

  @Column({ type: 'timestamptz', nullable: true })
  readAt!: Date | null
}
