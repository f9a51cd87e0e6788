/** A reading process that does to itself what the file's name says. */
import type { ReadingRequest } from '../../worker/child/reading-messages.ts'
import { readOutcome } from './outcomes.ts'

process.on('disconnect', () => process.exit(0))
process.on('message', ({ id, picture, known }: ReadingRequest) => {
  if (picture.fileName === 'dies.jpg') process.kill(process.pid, 'SIGSEGV')
  // Not even a timer of its own could end this one.
  if (picture.fileName === 'spins.jpg') for (;;);
  if (picture.fileName === 'fault.jpg') process.send?.({ id, fault: 'the picture turned to dust' })
  else process.send?.({ id, read: { outcome: readOutcome(picture.bytes.length + known.known.kits.size), picture: null } })
})
