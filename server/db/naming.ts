import { DefaultNamingStrategy, type NamingStrategyInterface } from 'typeorm'

/** ratedPower_kw -> rated_power_kw. */
export const toSnake = (name: string) => name.replace(/([a-z0-9])([A-Z])/g, '$1_$2').toLowerCase()

export class SnakeNaming extends DefaultNamingStrategy implements NamingStrategyInterface {
  override columnName(propertyName: string, customName: string | undefined, prefixes: string[]): string {
    return prefixes.map((p) => `${toSnake(p)}_`).join('') + (customName ?? toSnake(propertyName))
  }
}
