/** Soil by feel: fine, medium or coarse, or one of the twelve USDA textures, gathered to the three classes of D497 [P]. */
export type Soil = 'fine' | 'medium' | 'coarse'

const TEXTURES: Readonly<Record<Soil, readonly string[]>> = {
  fine: ['clay', 'silty clay', 'sandy clay', 'silty clay loam', 'clay loam'],
  medium: ['loam', 'silt loam', 'silt', 'sandy clay loam'],
  coarse: ['sandy loam', 'loamy sand', 'sand'],
}

/** The class of a written soil; null when it names none. */
export function soilOf(written: string | null): Soil | null {
  const text = (written ?? '').toLowerCase().replaceAll('_', ' ')
  const classes = Object.keys(TEXTURES) as Soil[]
  return classes.find((soil) => soil === text || TEXTURES[soil].includes(text)) ?? null
}
