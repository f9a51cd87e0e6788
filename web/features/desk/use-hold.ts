import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import { ApiError } from '../../lib/api-error.ts'
import { clockOf } from '../../lib/time.ts'
import { deskQueries, letGo, takeInHand } from './desk.queries.ts'

/** The lease is a minute long and renewed twice in it. */
const RENEW_MS = 30_000
/** While somebody else has it. */
const AGAIN_MS = 5_000

/**
 * Takes the sheet in hand while the desk is open, and keeps asking while somebody else has it. Null while nobody else has it,
 * else who does, in words: then it may only be looked at.
 */
export function useHold(sheet: Sheet, meId: string): string | null {
  const cache = useQueryClient()
  const [refused, setRefused] = useState<string | null>(
    sheet.inHand && sheet.inHand.userId !== meId ? heldBy(sheet.inHand) : null,
  )
  const { id } = sheet
  useEffect(() => {
    let open = true
    let timer: ReturnType<typeof setTimeout> | null = null
    const { queryKey } = deskQueries.detail(id)
    const take = async () => {
      let again_ms = RENEW_MS
      try {
        const taken = await takeInHand(id)
        const known = cache.getQueryData(queryKey)
        if (open && (!known || taken.version >= known.version)) cache.setQueryData(queryKey, taken)
        if (open) setRefused(null)
      } catch (error) {
        if (error instanceof ApiError && error.code === 'conflict') {
          again_ms = AGAIN_MS
          // Who has it, and what they have done meanwhile.
          if (open) await cache.refetchQueries({ queryKey }).catch(() => undefined)
          const holder = cache.getQueryData(queryKey)?.inHand
          if (open) setRefused(holder && holder.userId !== meId ? heldBy(holder) : error.message)
        }
      }
      if (open) timer = setTimeout(take, again_ms)
    }
    void take()
    return () => {
      open = false
      if (timer) clearTimeout(timer)
      void letGo(id).catch(() => undefined)
    }
  }, [id, meId, cache])
  return refused
}

const heldBy = ({ name, since }: NonNullable<Sheet['inHand']>) => `${name} has this sheet in hand since ${clockOf(since)}.`
