/** A hand as a condition asks for it, otherwise as any other. */
import type { Chance } from '../random.ts'
import { makeWriter, type Writer } from '../writer.ts'
import type { Condition, Range } from './condition.ts'

/** Chance of a small change of colour from sheet to sheet, levels of 255. */
const TINT = 8

export function handOf(wanted: Condition['writer'], careful: number, chance: Chance): Writer {
  const writer = makeWriter(chance, careful, wanted?.pencil)
  if (!wanted) return writer
  const own = chance.fork('own')
  const draw = (range: Range | undefined, otherwise: number) => (range ? own.between(range[0], range[1]) : otherwise)
  const direction = own.between(0, 6.28)
  const off_mm = draw(wanted.offCentre_mm, 0)
  const slant = draw(wanted.slant, writer.slant)
  return {
    ...writer,
    pen: {
      width_mm: draw(wanted.penWidth_mm, writer.pen.width_mm),
      strength: draw(wanted.penStrength, writer.pen.strength),
      dry: draw(wanted.penDry, writer.pen.dry),
    },
    colour: wanted.colour ? tinted(wanted.colour, own) : writer.colour,
    stroke: wanted.traced ? 'traced' : writer.stroke,
    slant: wanted.slant && own.odds(0.4) ? -slant : slant,
    size: draw(wanted.size, writer.size),
    sizeSpread: draw(wanted.sizeSpread, writer.sizeSpread),
    reach: draw(wanted.reach, writer.reach),
    shift: wanted.offCentre_mm ? [off_mm * Math.cos(direction), off_mm * Math.sin(direction)] : writer.shift,
    stray_mm: draw(wanted.stray_mm, writer.stray_mm),
    slips: draw(wanted.slips, writer.slips),
  }
}

const tinted = ([r, g, b]: readonly [number, number, number], chance: Chance): Writer['colour'] => [
  r + chance.between(-TINT, TINT),
  g + chance.between(-TINT, TINT),
  b + chance.between(-TINT, TINT),
]
