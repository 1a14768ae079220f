const http = require('node:http')
const { getDefaultConfig } = require('expo/metro-config')

const config = getDefaultConfig(__dirname)

// The shipped fonts are woff2, which the default list of asset kinds lacks.
config.resolver.assetExts.push('woff2')

// Development only: hands /api to the Express server, so that the browser sees one origin.
const api = new URL(process.env.API_ORIGIN ?? 'http://127.0.0.1:3001')
const wrap = config.server?.enhanceMiddleware
config.server = {
  ...config.server,
  enhanceMiddleware: (middleware, server) => {
    const inner = wrap ? wrap(middleware, server) : middleware
    return (req, res, next) => {
      if (!req.url?.startsWith('/api/')) return inner(req, res, next)
      const { method, headers, url: path } = req
      const forwarded = http.request({ host: api.hostname, port: api.port, path, method, headers }, (answer) => {
        res.writeHead(answer.statusCode ?? 502, answer.headers)
        answer.pipe(res)
      })
      forwarded.on('error', () => {
        if (res.headersSent) return res.end()
        res.writeHead(502, { 'content-type': 'application/problem+json' })
        res.end(JSON.stringify({ type: '/problems/unreachable', title: 'The server is starting.', status: 502 }))
      })
      req.pipe(forwarded)
    }
  },
}

// zod re-exports its fifty languages from one index, which Metro does not shake out: only English is used.
const resolve = config.resolver.resolveRequest
config.resolver.resolveRequest = (context, name, platform) => {
  const isLocaleIndex = /locales\/index\.(c?js)$/.test(name)
  if (isLocaleIndex && /[\\/]node_modules[\\/]zod[\\/]/.test(context.originModulePath)) return { type: 'empty' }
  return (resolve ?? context.resolveRequest)(context, name, platform)
}

module.exports = config
