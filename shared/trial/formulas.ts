/**
 * Every formula in use, in words and with its source, for the record page and the dictionary of data. Where a standard was
 * not opened it says so: [M] quoted from memory, [P] common practice, [F] seen in a published page.
 */
interface Formula {
  says: string
  source: string
}

export const FORMULAS = {
  C01: { says: 'jar at the start + top-ups − jar at the end', source: 'mass balance [P]' },
  C02: {
    says: 'each level brought to 15 °C by its own temperature, then the balance',
    source: 'ASTM D1250-80, table 54B [F], applied to C01',
  },
  C03: { says: 'fuel used ÷ time, area, distance or load', source: '[P]; quantities of IS 9253 and PAES [M]' },
  C04: { says: 'fuel used ÷ (area × mean depth)', source: '[P]' },
  C05: { says: 'length × breadth; two triangles on a diagonal (Heron); passes × mean width × length', source: 'geometry' },
  C07: { says: 'rated width × speed ÷ 10', source: 'ASAE EP496.3, D497.7 [M]' },
  C08: { says: 'area ÷ field time', source: 'ASAE EP496 [M]; what is left out: extension pages [F]' },
  C09: { says: '100 × effective ÷ theoretical field capacity, by the rated width', source: 'ASAE EP496, D497 [M]' },
  C10: { says: 'mean; spread with n − 1; 100 × spread ÷ mean', source: 'textbook; checked against NIST StRD' },
  C11: { says: '3.6 × runs × distance ÷ all their times', source: '[P]' },
  C12: { says: '100 × (1 − way in work ÷ way without load), same wheel turns', source: 'ASAE S296.5 [M]' },
  C13: {
    says: '100 × (turns in work − turns without load) ÷ turns in work, same way',
    source: 'OECD Code 2 [M]; operator manual OMRE283529 [F]',
  },
  C14: { says: '100 × (time in work − time without load) ÷ time in work, same way', source: 'operator manual OMCQ72264 [F]' },
  C16: {
    says: 'density at 15 °C that gives the reading at its temperature',
    source: 'ASTM D1250-80, table 53B [F]',
  },
  C17: { says: 'litres at 15 °C × density at 15 °C', source: 'ASTM D1250' },
  C18: {
    says: 'pull × speed; 2π × PTO speed × torque; power × time; fuel ÷ energy',
    source: 'OECD Code 2, ISO 789 [M]',
  },
  C19: {
    says: '(0.22 X + 0.096) × (1 − (N − 1)(0.45 X − 0.877)) × rated PTO power',
    source: 'ASAE D497.7 as in Grisso et al. 2004, VCE 442-073 [F]',
  },
  C20: { says: '(2.64 X + 3.91 − 0.203 √(738 X + 173)) × X × rated PTO power', source: 'ASAE D497.4 [F]' },
  C21: { says: '0.223 × rated PTO power', source: 'ASAE EP496.3 as quoted by Grisso [F]' },
  C22: { says: 'F (A + B v + C v²) × width or tools × depth', source: 'ASAE D497 table 1, in part [F], in part [M]' },
  C23: { says: '100 × (wet − dry) ÷ (dry − can)', source: 'ASTM D2216, ISO 11465 [M]' },
  C24: { says: 'litres a hectare × price + hourly costs ÷ field capacity', source: 'idea of ASAE EP496; [P]' },
  C25: { says: 'fuel to expect per hour ÷ field capacity', source: 'definition' },
  A_w: { says: 'written area × size of its unit', source: 'NIST SP 811 App. B [M]; a local unit: as confirmed for the district' },
  T: { says: 'end − start − stops with the engine off', source: '[P]' },
  T_f: { says: 'T − stops that are no field work', source: 'ASAE EP496 [M]; extension pages [F]' },
} as const satisfies Record<string, Formula>

export type FormulaId = keyof typeof FORMULAS

/** A formula by the id a result carries; null for an id of another version. */
export const formulaOf = (id: string): Formula | null => (FORMULAS as Record<string, Formula>)[id] ?? null
