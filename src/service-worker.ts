/// <reference lib="webworker" />
import { clientsClaim } from 'workbox-core'
import { ExpirationPlugin } from 'workbox-expiration'
import { cleanupOutdatedCaches, createHandlerBoundToURL, precacheAndRoute } from 'workbox-precaching'
import { NavigationRoute, registerRoute } from 'workbox-routing'
import type { WorkboxPlugin } from 'workbox-core/types.js'
import { CacheFirst, NetworkFirst } from 'workbox-strategies'

/**
 * Lets a shoot open where there is no signal: the built shell, what a shoot's screens ask for, and pictures already
 * seen. Documents are not its business (they live in IndexedDB). Caches named `sconce-data…` are forgotten at sign-out.
 */
declare const self: ServiceWorkerGlobalScope & { __WB_MANIFEST: { url: string; revision: string | null }[] }

void self.skipWaiting()
clientsClaim()
cleanupOutdatedCaches()
precacheAndRoute(self.__WB_MANIFEST)

registerRoute(
  new NavigationRoute(createHandlerBoundToURL('/index.html'), {
    denylist: [/^\/api\//, /^\/rt\//, /^\/healthz/, /^\/readyz/, /^\/metrics/],
  }),
)

const READ_OFFLINE = /^\/api\/(session|shoots|shoots\/[0-9a-f-]{36}(\/(sign-offs|kit|people|comments))?)$/
registerRoute(
  ({ url, sameOrigin }) => sameOrigin && READ_OFFLINE.test(url.pathname),
  new NetworkFirst({ cacheName: 'sconce-data', networkTimeoutSeconds: 4 }),
)

registerRoute(
  ({ url, sameOrigin }) => sameOrigin && /^\/api\/uploads\/[0-9a-f-]{36}\/(320|960)$/.test(url.pathname),
  new CacheFirst({
    cacheName: 'sconce-data-pictures',
    plugins: [asPlugin(new ExpirationPlugin({ maxEntries: 600, maxAgeSeconds: 60 * 86_400, purgeOnQuotaError: true }))],
  }),
)

/** The library's own plugin: its declarations were not written for exact optional properties, which this project checks. */
function asPlugin(plugin: ExpirationPlugin): WorkboxPlugin {
  return plugin as WorkboxPlugin
}
