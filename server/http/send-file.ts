import type { Response } from 'express'

/** Answers with a file made on the spot; `name` is ours, so it needs no quoting. */
export function sendFile(res: Response, file: { type: string; name: string; bytes: Buffer; show?: boolean }): void {
  const { type, name, bytes, show = false } = file
  res
    .status(200)
    .set('Content-Type', type)
    .set('Content-Disposition', `${show ? 'inline' : 'attachment'}; filename="${name}"`)
    .send(bytes)
}
