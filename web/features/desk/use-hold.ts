import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { ApiError } from '../../lib/api-error.ts'
import { deskQueries, letGo, takeInHand } from './desk.queries.ts'

/** The lease is a minute long and renewed twice in it. */
const RENEW_MS = 30_000

/** Takes the sheet in hand while the desk is open. Null while nobody else has it, else who does, in words. */
export function useHold(sheetId: string, wanted: boolean): string | null {
  const cache = useQueryClient()
  const [held, setHeld] = useState<string | null>(null)
  useEffect(() => {
    if (!wanted) return
    let open = true
    const take = async () => {
      try {
        const sheet = await takeInHand(sheetId)
        const { queryKey } = deskQueries.detail(sheetId)
        const known = cache.getQueryData(queryKey)
        if (open && (!known || sheet.version >= known.version)) cache.setQueryData(queryKey, sheet)
        if (open) setHeld(null)
      } catch (error) {
        if (open && error instanceof ApiError && error.code === 'conflict') setHeld(error.message)
      }
    }
    void take()
    const timer = setInterval(take, RENEW_MS)
    return () => {
      open = false
      clearInterval(timer)
      void letGo(sheetId).catch(() => undefined)
    }
  }, [sheetId, wanted, cache])
  return held
}
