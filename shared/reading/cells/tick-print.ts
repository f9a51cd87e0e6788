/**
 * Whether a tick box can be seen at all: its own frame and heavy corner are the measure of what ink would look like there. Light
 * mirrored by the page lifts ink and print alike, so a washed-out tick looks like an empty box, but in a box without a frame.
 */
import type { TickDist } from '../classes.ts'

/** Print this much paler than the page's usual is hardly there, and so would ink be. */
const LEAST_SHARE = 0.4
/** Nor is print of this contrast (tickContrast) on any page: grain alone comes near it. */
const LEAST_CONTRAST = 0.15
/** From this share of the usual on the print is as dark as it should be: ink across a frame takes so much from it. */
const FULL_SHARE = 0.8
/** How far a box that is not seen is left open, whatever ink seems to be in it. */
const OPEN = 0.2

/** What print on this page usually comes out like: the median of its tick boxes. */
export const usualContrast = (contrasts: readonly number[]): number =>
  [...contrasts].sort((a, b) => a - b)[contrasts.length >> 1] ?? 1

export const isVisible = (contrast: number, usual: number): boolean =>
  contrast >= LEAST_CONTRAST && contrast >= LEAST_SHARE * usual

/** By what ink in a box is paler than elsewhere on the page, 0.4 to 1. */
export const fading = (contrast: number, usual: number): number =>
  Math.min(1, Math.max(LEAST_SHARE, contrast / (FULL_SHARE * Math.max(usual, LEAST_CONTRAST))))

/** The chances of a box that is not seen: never sure. */
export function leftOpen({ empty, ticked, spoiled }: TickDist): TickDist {
  const share = (p: number) => (1 - OPEN) * p + OPEN / 3
  return { empty: share(empty), ticked: share(ticked), spoiled: share(spoiled) }
}
