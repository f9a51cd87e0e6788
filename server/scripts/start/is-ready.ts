import { get } from 'node:http'

/** Whether the server on this loopback port says that it and its database are ready. */
export function isReady(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const request = get({ host: '127.0.0.1', port, path: '/api/health', timeout: 2_000 }, (answer) => {
      answer.resume()
      resolve(answer.statusCode === 200)
    })
    request.on('timeout', () => request.destroy())
    request.on('error', () => resolve(false))
  })
}
