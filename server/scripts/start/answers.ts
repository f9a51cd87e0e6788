import { get } from 'node:http'

/** Whether anything answers HTTP on this loopback port, whatever it says. */
export function answers(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const request = get({ host: '127.0.0.1', port, path: '/', timeout: 2_000 }, (answer) => {
      answer.resume()
      resolve(true)
    })
    request.on('timeout', () => request.destroy())
    request.on('error', () => resolve(false))
  })
}
