/** From the form a condition asks for to a surface in space. */
import type { Chance } from '../random.ts'
import { type Bend, bendSheet, drawBend, type Surface } from '../surface.ts'
import type { Form, Range } from './condition.ts'
import { crumple } from './crumple.ts'

type Page = { width: number; height: number }

const DOWN = Math.PI / 2
const FLAT_BEND: Bend = { angle: 0, waves: [], lift: null, fold: 0, ripple_mm: 0 }

const draw = (chance: Chance, [low, high]: Range) => chance.between(low, high)
const side = (chance: Chance) => (chance.odds(0.5) ? 1 : -1)

/** Two bends one over the other: heights add up, and so do the small shifts along the page. */
function both(a: Surface, b: Surface, page: Page): Surface {
  return {
    angle: a.angle,
    at: (x, y) => {
      const [p, q] = [a.at(x, y), b.at(x, y)]
      return [p[0] + q[0] - (x - page.width / 2), p[1] + q[1] - (y - page.height / 2), p[2] + q[2]]
    },
    slope: (x, y) => a.slope(x, y) + b.slope(x, y),
  }
}

/** `curl_mm`: how far the paper leaves the table besides. */
export function shapeSheet(form: Form | undefined, curl_mm: number, page: Page, chance: Chance): Surface {
  const plain = bendSheet(drawBend(chance.fork('plain'), curl_mm), page)
  if (!form) return plain
  switch (form.kind) {
    case 'waves': {
      const wave = () => ({
        height_mm: draw(chance, form.height_mm),
        length_mm: draw(chance, form.length_mm),
        phase: chance.between(0, 6.28),
      })
      const angle = chance.odds(0.5) ? chance.normal(DOWN, 0.2) : chance.normal(0, 0.2)
      return bendSheet({ ...FLAT_BEND, angle, waves: [wave(), wave()] }, page)
    }
    case 'folds': {
      const fold = (angle: number) =>
        bendSheet({ ...FLAT_BEND, angle, fold: side(chance) * draw(chance, form.slope), ripple_mm: 0.4 }, page)
      const [across, lengthways] = [fold(DOWN), fold(0)]
      if (form.across && form.lengthways) return both(across, lengthways, page)
      return form.across ? across : lengthways
    }
    case 'rolled': {
      const curvature = side(chance) / draw(chance, form.radius_mm)
      const angle = chance.pick([0, DOWN]) + chance.normal(0, 0.05)
      return bendSheet({ ...FLAT_BEND, angle, waves: arc(curvature) }, page)
    }
    case 'crumpled':
      return crumple(Math.round(draw(chance, form.creases)), form.slope, page, chance)
  }
}

/** One wave far longer than the sheet, whose crest is in its middle: slope 0 there, and nearly constant curvature. */
function arc(curvature: number): Bend['waves'] {
  const length_mm = 1600
  return [{ height_mm: curvature * (length_mm / (2 * Math.PI)) ** 2, length_mm, phase: -DOWN }]
}
