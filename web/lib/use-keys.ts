import { useEffect, useLayoutEffect, useRef } from 'react'
import { letterKeysOn } from './letter-keys.ts'

/** `Enter`, `Shift+Enter`, `Ctrl+z`, `ArrowDown`, `?`, `1`. Letters are lower case. */
export type KeyMap = Record<string, ((event: KeyboardEvent) => void) | undefined>

interface Options {
  /** Off while a dialog owns the keyboard. */
  on?: boolean
}

/** How a key press is named in a KeyMap. Shift counts only for keys that print nothing: `?` is `?` on every keyboard. */
export function keyName(event: KeyboardEvent): string {
  const printing = event.key.length === 1
  const key = printing && !event.shiftKey ? event.key.toLowerCase() : event.key
  return [
    event.ctrlKey || event.metaKey ? 'Ctrl+' : '',
    event.altKey ? 'Alt+' : '',
    event.shiftKey && !printing ? 'Shift+' : '',
    key,
  ].join('')
}

const TYPED_IN = 'input, textarea, select, [contenteditable]'
/** Keys that work even while typing: they print nothing there. */
const THROUGH = /^(Shift\+Enter|F\d+|Escape|Ctrl\+.*)$/

/**
 * The keys of a page. While a field has the focus only those that print nothing get through; a focused link or button keeps
 * its own Enter and space. Single letters can be switched off (WCAG 2.1.4).
 */
export function useKeys(keys: KeyMap, { on = true }: Options = {}): void {
  const latest = useRef(keys)
  // With the picture, not after it: the next key press must meet what is on the screen.
  useLayoutEffect(() => {
    latest.current = keys
  })
  useEffect(() => {
    if (!on) return
    const pressed = (event: KeyboardEvent) => {
      if (event.defaultPrevented || event.isComposing) return
      const name = keyName(event)
      const handler = latest.current[name]
      if (!handler || !letsThrough(name, event.target)) return
      event.preventDefault()
      handler(event)
    }
    window.addEventListener('keydown', pressed)
    return () => window.removeEventListener('keydown', pressed)
  }, [on])
}

function letsThrough(name: string, target: EventTarget | null): boolean {
  if (/^[a-z/]$/.test(name) && !letterKeysOn()) return false
  if (!(target instanceof Element)) return true
  if (target.closest(TYPED_IN) && !THROUGH.test(name)) return false
  return !(target.closest('a[href], button, summary') && (name === 'Enter' || name === ' '))
}
