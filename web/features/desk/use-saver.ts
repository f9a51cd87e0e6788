import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useState, useSyncExternalStore } from 'react'
import { deskQueries, postSettlement } from './desk.queries.ts'
import { createDeskSaver, type DeskSaver, type SaverState } from './desk-saver.ts'

/** The saver of one sheet; mount the desk with `key={sheetId}`. It sends nothing until it is on. */
export function useSaver(sheetId: string, on: boolean): { saver: DeskSaver; saved: SaverState } {
  const cache = useQueryClient()
  const [saver] = useState(() => {
    const { queryKey } = deskQueries.detail(sheetId)
    return createDeskSaver({
      sheetId,
      current: () => cache.getQueryData(queryKey),
      put: (sheet) => cache.setQueryData(queryKey, sheet),
      reload: () => cache.refetchQueries({ queryKey }),
      post: (body) => postSettlement(sheetId, body),
    })
  })
  useEffect(() => (on ? saver.open() : undefined), [saver, on])
  return { saver, saved: useSyncExternalStore(saver.subscribe, saver.state) }
}
