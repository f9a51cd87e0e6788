import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useSyncExternalStore } from 'react'
import { outbox } from './outbox.ts'
import { uploadQueries } from './uploads.queries.ts'

export const useOutbox = () => useSyncExternalStore(outbox.subscribe, outbox.current)

/** Keeps the outbox at work while somebody is signed in; what the server answered refreshes the lists. */
export function useOutboxAtWork(userId: string): void {
  const cache = useQueryClient()
  useEffect(() => {
    let stop: (() => void) | null = null
    let gone = false
    outbox
      .start(userId)
      .then((stopIt) => {
        if (gone) stopIt()
        else stop = stopIt
      })
      // No IndexedDB (a private window): files are then sent at once or not at all, which the send page says.
      .catch(() => undefined)
    return () => {
      gone = true
      stop?.()
    }
  }, [userId])
  const { answers } = useOutbox()
  useEffect(() => {
    if (answers.length > 0) void cache.invalidateQueries({ queryKey: uploadQueries.all() })
  }, [answers, cache])
}
