/** The reader the figures are about: the same function that `npm run read` and the worker call. */
import { createPhotoReader } from '../../worker/readers/photo/read-page.ts'
import type { BenchReader } from './reading-json.ts'

export const openReader = async (): Promise<BenchReader> => createPhotoReader()
