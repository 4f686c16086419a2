import { join } from 'node:path'
import { createServer } from 'vite'
import { root } from './paths.mjs'

/**
 * Lets a script use the product's own TypeScript modules, as they are and without a build.
 *
 * @returns {Promise<{ load: (path: string) => Promise<Record<string, any>>, close: () => Promise<void> }>}
 */
export async function loadSources() {
  const server = await createServer({
    root,
    configFile: false,
    appType: 'custom',
    logLevel: 'error',
    cacheDir: join(root, 'node_modules', '.cache', 'wherefore-sources'),
    optimizeDeps: { noDiscovery: true },
    server: { middlewareMode: true, hmr: false, watch: null, ws: false },
    resolve: { alias: { '#shared': join(root, 'shared'), '#server': join(root, 'server') } },
  })
  return { load: (path) => server.ssrLoadModule(path), close: () => server.close() }
}
