import { type RefObject, useLayoutEffect } from 'react'

interface AlignedRow {
  pane: RefObject<HTMLElement | null>
  /** The place in the margin whose lower edge the row is brought to. */
  crop: RefObject<HTMLElement | null>
  /** Lower edge of the row on the page, as a share of the page's height; null: nothing is in hand. */
  share: number | null
}

const FOOT_PX = 60

/**
 * Scrolls the sheet so that the row in hand meets the enlarged ink beside it: the band then runs straight from one to the
 * other. Nothing glides: the page jumps, as a page does that is turned.
 */
export function useAlignedRow({ pane, crop, share }: AlignedRow): void {
  useLayoutEffect(() => {
    const box = pane.current
    const leaf = box?.firstElementChild
    if (!box || !(leaf instanceof HTMLElement)) return
    if (share === null) {
      // Opened with nothing in hand: the head of the sheet, not the room above it.
      if (box.scrollTop === 0) box.scrollTop = leaf.offsetTop
      return
    }
    const align = () => {
      const top = box.getBoundingClientRect().top
      const wanted_px = crop.current ? crop.current.getBoundingClientRect().bottom - top : box.clientHeight / 2
      box.scrollTop = leaf.offsetTop + share * leaf.clientHeight - Math.min(wanted_px, box.clientHeight - FOOT_PX)
    }
    align()
    const watcher = new ResizeObserver(align)
    watcher.observe(box)
    if (crop.current) watcher.observe(crop.current)
    return () => watcher.disconnect()
  }, [pane, crop, share])
}
