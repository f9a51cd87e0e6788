/** Plane areas from tape lengths (C05, C06). Lengths in m, areas in m². Source: geometry. */
import { type Quantity, squareMetres } from './quantity.ts'

type Metres = Quantity<'m'>
type SquareMetres = Quantity<'m2'>

export const rectangleArea = (length: Metres, breadth: Metres): SquareMetres => squareMetres(length * breadth)

/** Area of passes side by side: passes × mean width × length of a pass. */
export const stripArea = (passes: number, width: Metres, length: Metres): SquareMetres => squareMetres(passes * width * length)

/**
 * Area of a triangle by its sides; null when they cannot close (strict triangle inequality).
 * Kahan's order of Heron's formula: thin triangles keep their digits.
 */
export function triangleArea(side1: Metres, side2: Metres, side3: Metres): SquareMetres | null {
  const [a = 0, b = 0, c = 0] = [side1, side2, side3].sort((x, y) => y - x)
  if (c <= 0 || b + c <= a) return null
  return squareMetres(0.25 * Math.sqrt((a + (b + c)) * (c - (a - b)) * (c + (a - b)) * (a + (b - c))))
}

export interface Quadrilateral {
  ab: Metres
  bc: Metres
  cd: Metres
  da: Metres
}

/** Two triangles on the diagonal A–C; null when one of them cannot close. */
export function quadrilateralByAc(sides: Quadrilateral, ac: Metres): SquareMetres | null {
  const abc = triangleArea(sides.ab, sides.bc, ac)
  const acd = triangleArea(sides.cd, sides.da, ac)
  return abc === null || acd === null ? null : squareMetres(abc + acd)
}

/** Two triangles on the diagonal B–D; null when one of them cannot close. */
export function quadrilateralByBd(sides: Quadrilateral, bd: Metres): SquareMetres | null {
  return quadrilateralByAc({ ab: sides.bc, bc: sides.cd, cd: sides.da, da: sides.ab }, bd)
}

/** Area by four sides and both diagonals (Bretschneider); null when the lengths contradict each other. */
export function quadrilateralByBoth(sides: Quadrilateral, ac: Metres, bd: Metres): SquareMetres | null {
  const cross = sides.bc ** 2 + sides.da ** 2 - sides.ab ** 2 - sides.cd ** 2
  const inner = 4 * ac ** 2 * bd ** 2 - cross ** 2
  return inner <= 0 ? null : squareMetres(0.25 * Math.sqrt(inner))
}

/** Smallest angle of a triangle in degrees; under 20° small tape errors move the area much. Null when it cannot close. */
export function smallestAngle_deg(side1: Metres, side2: Metres, side3: Metres): number | null {
  const area = triangleArea(side1, side2, side3)
  if (area === null) return null
  const [a = 0, b = 0] = [side1, side2, side3].sort((x, y) => y - x)
  // Opposite the shortest side; the sine is safe here because that angle is at most 60°.
  return (Math.asin(Math.min(1, (2 * area) / (a * b))) * 180) / Math.PI
}
