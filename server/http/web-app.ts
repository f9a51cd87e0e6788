import { existsSync } from 'node:fs'
import { resolve } from 'node:path'
import express, { Router } from 'express'

/** The built web app: its files, and index.html for every address a person may open. Nothing else of the disk. */
export function webApp(webDir: string): Router {
  const router = Router()
  const index = resolve(webDir, 'index.html')
  router.use(
    '/assets',
    express.static(resolve(webDir, 'assets'), { index: false, immutable: true, maxAge: '1y', dotfiles: 'ignore' }),
  )
  router.use(express.static(resolve(webDir), { index: false, dotfiles: 'ignore' }))
  router.get('/{*splat}', (req, res, next) => {
    // A missing picture or script is missing; only addresses without an ending are pages.
    if (/\.\w+$/.test(req.path) || !existsSync(index)) return next()
    // By root and name: a dot folder on the way there (.data) must not count as a hidden file.
    res.set('Cache-Control', 'no-cache').sendFile('index.html', { root: resolve(webDir) })
  })
  return router
}
