import { CannotStart } from '../../postgres/cannot-start.ts'
import { isFree } from '../../postgres/free-port.ts'
import { say } from './say.ts'

const USUAL_PORT = 4180
const NEIGHBOURS = 20

/**
 * The port people open in the browser: the one they asked for, or the usual one, or a free one beside it.
 * @throws CannotStart when the wanted one is taken
 */
export async function choosePort(wanted: number | undefined): Promise<number> {
  if (wanted !== undefined) {
    if (await isFree(wanted)) return wanted
    throw new CannotStart(`Port ${wanted} is taken by another program.`, 'Stop that one, or start with another PORT.')
  }
  for (let port = USUAL_PORT; port < USUAL_PORT + NEIGHBOURS; port += 1) {
    if (!(await isFree(port))) continue
    if (port !== USUAL_PORT) say(`Port ${USUAL_PORT} is taken; using ${port}.`)
    return port
  }
  throw new CannotStart(
    `Ports ${USUAL_PORT} to ${USUAL_PORT + NEIGHBOURS - 1} are all taken.`,
    'Start with PORT set to a free one.',
  )
}
