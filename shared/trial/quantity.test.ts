import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { UserError } from '../errors.ts'
import { convert, metres, quantity, unitFromTick } from './quantity.ts'

// Units: NIST SP 811 App. B, exact by definition.
describe('units', () => {
  const one = <U extends Parameters<typeof quantity>[1]>(unit: U) => quantity(1, unit)

  it('convert by their definitions', () => {
    expect(convert(one('acre'), 'acre', 'm2')).toBe(4046.8564224)
    expect(convert(one('ha'), 'ha', 'acre')).toBeCloseTo(2.471053814671653, 14)
    expect(convert(one('ft'), 'ft', 'm')).toBe(0.3048)
    expect(convert(one('in'), 'in', 'm')).toBe(0.0254)
    expect(convert(one('mile/h'), 'mile/h', 'km/h')).toBe(1.609344)
    expect(convert(one('hp'), 'hp', 'kW')).toBeCloseTo(0.7456998715822702, 14)
    expect(convert(one('metric_hp'), 'metric_hp', 'kW')).toBe(0.73549875)
    expect(convert(one('psi'), 'psi', 'kPa')).toBeCloseTo(6.894757293168361, 13)
    expect(convert(one('kgf/cm2'), 'kgf/cm2', 'psi')).toBeCloseTo(14.223343307119563, 12)
    expect(convert(one('bar'), 'bar', 'kPa')).toBe(100)
    expect(convert(one('us_gal'), 'us_gal', 'L')).toBe(3.785411784)
    expect(convert(one('imp_gal'), 'imp_gal', 'L')).toBe(4.54609)
    expect(convert(one('us_gal/acre'), 'us_gal/acre', 'L/ha')).toBeCloseTo(9.353956228956228, 13)
  })

  it('turn published fuel figures into L/ha (Missouri Extension G1208, E6 and E7)', () => {
    const perHectare = (galPerAcre: number) => convert(quantity(galPerAcre, 'us_gal/acre'), 'us_gal/acre', 'L/ha')
    expect(perHectare(1.68)).toBeCloseTo(15.715, 3)
    expect(perHectare(1.1)).toBeCloseTo(10.29, 2)
    expect(perHectare(0.65)).toBeCloseTo(6.08, 2)
  })

  it('come back unchanged from any unit of the same dimension', () => {
    const pairs = [
      ['m', 'ft'],
      ['m2', 'acre'],
      ['mL', 'imp_gal'],
      ['kPa', 'psi'],
      ['kW', 'hp'],
      ['L/ha', 'us_gal/acre'],
    ] as const
    fc.assert(
      fc.property(fc.constantFrom(...pairs), fc.double({ min: -1e6, max: 1e6, noNaN: true }), ([from, to], x) => {
        // The pairs are of one dimension by construction; the types cannot see through the list.
        const there = convert(quantity(x, from as 'm'), from as 'm', to as 'ft')
        expect(convert(there, to as 'ft', from as 'm')).toBeCloseTo(x, 6)
      }),
    )
  })

  it('are refused across dimensions, by the compiler and, untyped, at run time', () => {
    // @ts-expect-error a length is no area
    expect(() => convert(metres(1), 'm', 'ha')).toThrow('they cannot be converted')
    // @ts-expect-error millilitres are no metres
    const wrong: ReturnType<typeof metres> = quantity(1, 'mL')
    expect(wrong).toBe(1)
  })

  it('refuse what is no number', () => {
    expect(() => quantity(Number.NaN, 'mL')).toThrow('not a number')
  })

  it('name the units a tick may mean when it means none', () => {
    expect(unitFromTick('area', 'ha')).toBe('ha')
    expect(() => unitFromTick('area', 'bigha')).toThrow(UserError)
    expect(() => unitFromTick('pressure', 'ha')).toThrow('one of kPa, bar, psi, kgf/cm2 is needed')
  })
})
