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
    const again = () => void outbox.sendAll()
    window.addEventListener('online', again)
    // The browser may throw stored files away when room is short; asked for once, it does not.
    void navigator.storage?.persist?.()
    outbox
      .start(userId)
      .then((stopIt) => {
        if (gone) stopIt()
        else stop = stopIt
      })
      // No IndexedDB (some private windows): the send page then says that nothing can be kept.
      .catch(() => undefined)
    return () => {
      gone = true
      window.removeEventListener('online', again)
      stop?.()
    }
  }, [userId])
  const { answers } = useOutbox()
  useEffect(() => {
    if (answers.length > 0) void cache.invalidateQueries({ queryKey: uploadQueries.all() })
  }, [answers, cache])
}
