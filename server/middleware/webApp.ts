import { join } from 'node:path'

import { type RequestHandler, Router } from 'express'
import expressStaticGzip from 'express-static-gzip'

const ONE_YEAR_SECONDS = 31_536_000
/** Names in these folders carry a hash of their content. */
const HASHED = /[\\/](_expo[\\/]static|assets)[\\/].*[.-][0-9a-f]{32}\./

function cacheHeader(path: string): string {
  return HASHED.test(path) ? `public, max-age=${ONE_YEAR_SECONDS}, immutable` : 'no-cache'
}

/** The web build, compressed beforehand; every address that is no file is a screen of the one page. */
export function webApp(root: string): RequestHandler {
  const router = Router()
  router.use(
    expressStaticGzip(root, {
      enableBrotli: true,
      orderPreference: ['br'],
      serveStatic: { setHeaders: (res, path) => res.setHeader('Cache-Control', cacheHeader(path)) },
    }),
  )
  router.get('/{*path}', (req, res, next) => {
    const isFile = /\.[a-z0-9]+$/i.test(req.path)
    if (isFile || !req.accepts('html')) return next()
    res.sendFile(join(root, 'index.html'), { headers: { 'Cache-Control': 'no-cache' } })
  })
  return router
}
