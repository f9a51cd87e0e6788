/**
 * A condition: one thing that is unusual about the picture, the paper, the print or the hand. It is plain data, so that a new
 * one is a new value, and so that a set is made again only when its own condition changes.
 */
import type { TakeAgainCode } from '../../../shared/reading/locate/take-again.ts'

export type Range = readonly [low: number, high: number]

/** The paper's form, for a page that is bent along one direction (see surface.ts), or crumpled. */
export type Form =
  | { kind: 'waves'; height_mm: Range; length_mm: Range }
  /** Pressed flat again: `slope` is the change of slope on either side. Across the middle, lengthways, or both. */
  | { kind: 'folds'; across: boolean; lengthways: boolean; slope: Range }
  | { kind: 'rolled'; radius_mm: Range }
  | { kind: 'crumpled'; creases: Range; slope: Range }

export interface Scanner {
  dpi: number
  grey: boolean
  /** 1 = true size. */
  scale: Range
  /** A copier's contrast, its specks, and whether it knows black and white only. */
  copier?: { contrast: Range; specks: Range; blackAndWhite: boolean }
}

export interface Condition {
  name: string
  /** Advice that fits where a picture is to be taken again; without it each must be read. */
  fits?: readonly TakeAgainCode[]
  /** No picture of it can be read. */
  hopeless?: boolean
  form?: Form
  shot?: {
    /** From straight above, radians, towards any side. */
    tilt?: Range
    /** Share of the picture that the page takes, by its tighter side. */
    fill?: Range
    /** Off the middle of the picture to the left or right, as a share of its width. */
    off?: Range
  }
  light?: {
    /** Brightness of white paper, 0 to 255. */
    level?: Range
    gradient?: Range
    glare?: Range
    /** A window mirrored on the paper: its side as a share of the picture's. */
    window?: Range
    /** Share of the light that the phone and the hands holding it take. */
    phone?: Range
    /** Warm on one side and cold on the other: red and blue against green, as a share. */
    mixed?: Range
  }
  optics?: { defocus_px?: Range; shake_px?: Range; grain?: Range; jpegQuality?: Range }
  paper?: {
    /** Colours to choose from, RGB of the bare paper. */
    whites?: ReadonlyArray<readonly [number, number, number]>
    /** 1 prints full black. */
    toner?: Range
    /** Share of the toner that pale streaks along the page lack at most. */
    streaks?: Range
  }
  /** Sheet of paper it was printed on, mm, and the size of the print, 1 = true size; A4 and true size otherwise. */
  print?: { width: number; height: number; scale: number }
  lost?: { folded: boolean; legs_mm: Range }
  thumb?: boolean
  scanner?: Scanner
  writer?: {
    size?: Range
    sizeSpread?: Range
    reach?: Range
    /** mm off the middle of the box, to any side. */
    offCentre_mm?: Range
    stray_mm?: Range
    slips?: Range
    penWidth_mm?: Range
    penStrength?: Range
    penDry?: Range
    slant?: Range
    colour?: readonly [number, number, number]
    pencil?: boolean
    traced?: boolean
  }
}
