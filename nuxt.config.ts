import { fileURLToPath } from 'node:url'

/**
 * The server build and type folders can be moved (`WHEREFORE_BUILD_DIR`), so that tests build beside a running
 * department instead of under it.
 */
const buildRoot = process.env.WHEREFORE_BUILD_DIR

export default defineNuxtConfig({
  compatibilityDate: '2026-11-01',
  modules: ['@nuxtjs/tailwindcss', '@pinia/nuxt', '@sidebase/nuxt-auth', '@nuxt/eslint'],
  devtools: { enabled: false },
  telemetry: false,
  ssr: true,
  ...(buildRoot ? { buildDir: `${buildRoot}/nuxt` } : {}),
  css: [
    '@fontsource/public-sans/latin-400.css',
    '@fontsource/public-sans/latin-500.css',
    '@fontsource/public-sans/latin-600.css',
    '@fontsource/public-sans/latin-700.css',
    '~/assets/css/main.css',
  ],
  components: [{ path: '~/components', pathPrefix: false }],
  imports: { dirs: [] },
  app: {
    head: {
      htmlAttrs: { lang: 'en' },
      title: 'Wherefore',
      meta: [
        { name: 'viewport', content: 'width=device-width, initial-scale=1' },
        { name: 'robots', content: 'noindex' },
      ],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/mark.svg' }],
    },
  },
  runtimeConfig: {
    /** PostgreSQL address for the `wherefore_app` role: reads and writes rows, owns nothing. */
    databaseUrl: '',
    /** PostgreSQL address for the role that owns the schema; used only to migrate at start. Empty: migrated elsewhere. */
    ownerDatabaseUrl: '',
    /** PostgreSQL address for the `wherefore_worker` role that runs the job queue. */
    workerDatabaseUrl: '',
    /** Folder of the generated migrations, shipped beside the built server. */
    migrationsDir: '',
    /** At least 32 random bytes; signs the session cookie. */
    authSecret: '',
    /** Public address of this server, without a trailing slash: `https://wherefore.example.org`. */
    origin: '',
    /** `on` only through the start script: shows demo sign-ins, refuses any address but loopback. */
    demo: '',
    /** How many reverse proxies stand in front; their X-Forwarded-For entries are believed. */
    trustedProxies: '0',
    ehr: {
      baseUrl: '',
      /** `none` or `backend-services` (SMART Backend Services, private_key_jwt). */
      auth: 'none',
      clientId: '',
      /** Private JWK as JSON text, RS384 or ES384, with `kid`. */
      privateJwk: '',
      tokenUrl: '',
      scope: '',
      /** Identifier system of the record number, for `Patient?identifier=system|value`. Empty: value alone. */
      recordNumberSystem: '',
      /** The site's own creatinine codes, `system|code` by comma. */
      creatinineCodes: '',
      /** Origins other than the base URL's own that page links may name, by comma. */
      pageOrigins: '',
    },
    smtp: {
      host: '',
      port: '',
      user: '',
      password: '',
      /** `required`, or `off` for a catcher on loopback. */
      tls: 'required',
      from: '',
    },
    logLevel: 'info',
    public: {},
  },
  auth: {
    provider: { type: 'authjs', trustHost: false, addDefaultCallbackUrl: false },
    globalAppMiddleware: false,
    // Pages ask /api/me; the library's own look at the session would be a second one for each page rendered.
    disableServerSideAuth: true,
    sessionRefresh: { enablePeriodically: false, enableOnWindowFocus: false },
  },
  eslint: { config: { standalone: true } },
  tailwindcss: { viewer: false, cssPath: false },
  typescript: { strict: true, typeCheck: false },
  vite: { build: { sourcemap: false } },
  nitro: {
    ...(buildRoot ? { output: { dir: `${buildRoot}/output` } } : {}),
    alias: {
      // next-auth no longer exports its core, which @sidebase/nuxt-auth imports; see server/auth/next-auth-core.mjs.
      'next-auth/core': fileURLToPath(new URL('./server/auth/next-auth-core.mjs', import.meta.url)),
    },
    compressPublicAssets: { gzip: true, brotli: true },
    sourceMap: false,
  },
  experimental: { appManifest: false },
})
