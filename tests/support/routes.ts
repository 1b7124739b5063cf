import type { Express } from 'express'

type Layer = {
  route?: { path: string; stack: { method?: string }[] }
  handle: { stack?: Layer[] }
  /** Mounted at the root of its parent. */
  slash: boolean
  match: (path: string) => boolean
}

/** Every route of the app as `METHOD /path`, found by walking its routers. @throws on a router at a place this walk does not know */
export function routesOf(app: Express): string[] {
  return walk(layersOf(app.router), '').sort()
}

function walk(layers: readonly Layer[], prefix: string): string[] {
  return layers.flatMap((layer) => {
    if (layer.route) {
      const { path, stack } = layer.route
      const methods = new Set(stack.map(({ method }) => (method ?? 'all').toUpperCase()))
      return [...methods].map((method) => `${method} ${prefix}${path}`)
    }
    if (!layer.handle.stack) return []
    if (layer.slash) return walk(layer.handle.stack, prefix)
    if (layer.match('/api/anything')) return walk(layer.handle.stack, `${prefix}/api`)
    throw new Error('A router is mounted where the table of rights does not look.')
  })
}

/** Express does not type its layers; a change of their shape makes the walk find nothing, which fails the test. */
function layersOf(router: unknown): readonly Layer[] {
  return (router as { stack: Layer[] }).stack
}
