/** C23: soil water from oven masses, g, in % of the dry soil (ASTM D2216 110 °C, ISO 11465 105 °C, from memory). */
export const soilWater_pct = (can_g: number, wet_g: number, dry_g: number): number => (100 * (wet_g - dry_g)) / (dry_g - can_g)

/** Water in % of the wet soil: the frequent mistake, known here so that it can be named. */
export const waterOfWetSoil_pct = (can_g: number, wet_g: number, dry_g: number): number =>
  (100 * (wet_g - dry_g)) / (wet_g - can_g)
