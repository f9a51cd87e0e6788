import { useSyncExternalStore } from 'react'

function subscribe(changed: () => void): () => void {
  window.addEventListener('online', changed)
  window.addEventListener('offline', changed)
  return () => {
    window.removeEventListener('online', changed)
    window.removeEventListener('offline', changed)
  }
}

/** Whether the browser believes in a line. True means little (a dead access point counts); false is certain. */
export const useOnline = (): boolean => useSyncExternalStore(subscribe, () => navigator.onLine)
