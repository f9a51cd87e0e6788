/** What every column of a download says of itself: CSV, XLSX, Parquet, Data Package and dictionary are made from it. */
export interface Column {
  /** Stable name. */
  name: string
  /** The unit of every value in it; null where it has none, or where a column of its own names it. */
  unit: string | null
  kind: 'number' | 'integer' | 'text' | 'boolean' | 'date' | 'time' | 'moment'
  description: string
}

/** "l_per_ha [L/ha]" */
export const headerOf = ({ name, unit }: Pick<Column, 'name' | 'unit'>) => (unit ? `${name} [${unit}]` : name)
