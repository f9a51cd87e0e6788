import { statfs } from 'node:fs/promises'
import { TransientError } from '../../shared/errors.ts'
import { DISK_LIMITS } from '../../shared/limits.ts'

/** What a disk has left. */
export interface Room {
  free_bytes: number
  total_bytes: number
}

/** The room on the disk that holds `folder`. */
export async function roomIn(folder: string): Promise<Room> {
  const disk = await statfs(folder)
  return { free_bytes: disk.bavail * disk.bsize, total_bytes: disk.blocks * disk.bsize }
}

/**
 * Below the least free room nothing more is taken in: the database on the same disk must be able to go on.
 * @throws TransientError (`full`) when the disk would be left with less
 */
export function checkRoom(room: Room, bytes: number): void {
  const left = room.free_bytes - bytes
  if (left >= DISK_LIMITS.free_bytes && left >= room.total_bytes * DISK_LIMITS.free_share) return
  throw tooFull(`${(room.free_bytes / 1e9).toFixed(1)} GB of ${(room.total_bytes / 1e9).toFixed(0)} GB are free`)
}

/** The refusal, in words for the person whose file it was. */
export function tooFull(reason: string, cause?: unknown): TransientError {
  return new TransientError(
    `The disk is too full to keep this file (${reason}). Nothing was taken in. Send it again when an admin has made room.`,
    {
      full: true,
      retryAfter_s: 300,
      cause,
    },
  )
}
