/**
 * The reading process: pictures come in as messages, readings go out. A picture that crashes a decoder, or never ends, does so
 * here; the worker ends this process and starts another.
 */
import { createPhotoReader } from '../readers/photo/read-page.ts'
import { readPicture } from './read-picture.ts'
import type { ReadingAnswer, ReadingRequest } from './reading-messages.ts'

// Ctrl-C reaches the whole group, but the worker decides: it waits for the page in hand, then lets go of this process.
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => undefined)
process.on('disconnect', () => process.exit(0))

const reader = createPhotoReader()

async function answer({ id, picture, known }: ReadingRequest): Promise<ReadingAnswer> {
  try {
    return { id, read: await readPicture(await reader, picture, known) }
  } catch (cause) {
    return { id, fault: cause instanceof Error ? (cause.stack ?? cause.message) : String(cause) }
  }
}

process.on('message', (request: ReadingRequest) => {
  void answer(request).then((said) => process.send?.(said))
})
