import type { BookComparison, ComparisonQuery } from '../../../shared/schemas/book-comparison.ts'
import { listComparableRuns } from '../../db/desk/comparable-runs.ts'
import type { Deps } from '../../http/route.ts'
import { compareRuns, EXPECTED, figuresFor } from './compare-runs.ts'

/** A comparison out of the trial book, as it stands now. */
export async function compareInBook(deps: Deps, query: ComparisonQuery): Promise<BookComparison> {
  const book = await listComparableRuns(deps.source.manager, [...figuresFor(query.figure), EXPECTED])
  return compareRuns(book, query)
}
