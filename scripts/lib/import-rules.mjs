/**
 * Who may import whom, as lint rules. The same table is walked, independently of ESLint, by
 * tests/unit/architecture/imports.test.ts.
 */

/** Matches an import of something below one of the server's folders, by alias or by a relative path. */
const serverPart = (...parts) => `^(#server/|~/server/|~~/server/|(\\.\\./)+(server/)?)(${parts.join('|')})(/|$)`

const anyServer = { regex: '^(#server|~/server|~~/server|(\\.\\./)+server)(/|$)', message: 'Screens and shared code never import the server.' }
const h3 = { regex: '^(h3|nitropack|#imports|#nitro)', message: 'Services know nothing of HTTP: h3 stays in server/api, middleware, plugins and utils.' }
const vue = { regex: '^(vue|vue-router|pinia|@pinia/.*|#app|#imports|#components|nuxt)(/|$)', message: 'Shared code knows nothing of the screens.' }
const upward = { regex: '^(~|~~|(\\.\\./)+)/?(pages|layouts)/', message: 'Imports go downward: nobody imports a page or a layout.' }

const rule = (name, files, patterns, ignores = []) => ({
  name: `wherefore/imports/${name}`,
  files,
  ...(ignores.length > 0 ? { ignores } : {}),
  rules: { 'no-restricted-imports': ['error', { patterns }] },
})

/**
 * The order inside shared/domain. Words that all of it speaks (types, and the small closed lists beside them) may be imported
 * from anywhere, and so may the measure of plain text; rules only downward: assessment from guidance and safety, those from
 * kidney and contrast; request, booking and letter stand above, and nothing points back.
 */
const vocabulary = '(source$|[a-z-]+/types$|contrast/outcome$|assessment/needs$|request/(priority|lifecycle|form|messages)$|access/roles$|letter/(kinds|readability)$)'

/** What each folder of shared/domain may import beside itself and the vocabulary. */
const domainMay = {
  source: [],
  kidney: [],
  contrast: ['kidney'],
  policy: [],
  access: [],
  record: ['kidney'],
  guidance: ['kidney', 'contrast'],
  safety: ['kidney', 'contrast'],
  assessment: ['guidance', 'safety', 'kidney', 'contrast', 'policy', 'record'],
  request: ['policy', 'access', 'safety'],
  booking: ['policy', 'request'],
  letter: ['policy', 'request', 'safety', 'assessment'],
}

const domainRules = Object.entries(domainMay).flatMap(([folder, others]) => {
  const allowed = [folder, ...others].join('|')
  const patterns = (wayOut) => [
    {
      regex: folder === 'guidance' ? '^(?!(\\.|luxon$|minisearch$|#shared/domain/))' : '^(?!(\\.|luxon$|#shared/domain/))',
      message: 'shared/domain is pure: no package but luxon (zones and dates) and, to search questions, minisearch; no Node.',
    },
    {
      regex: `^(${wayOut}|#shared/domain/)(?!\\.\\./)(?!(${allowed})/)(?!${vocabulary})[a-z]`,
      message: `shared/domain/${folder} may import ${others.length > 0 ? others.join(', ') : 'nothing of the other folders'}, and types.`,
    },
  ]
  return [
    rule(`domain/${folder}`, [`shared/domain/${folder}/*.ts`], patterns('(\\.\\./)+')),
    rule(`domain/${folder}/below`, [`shared/domain/${folder}/*/**/*.ts`], patterns('(\\.\\./){2,}')),
  ]
})

export const importRules = [
  ...domainRules,
  rule('schemas', ['shared/schemas/**/*.ts'], [
    { regex: '^(?!(zod$|\\.|#shared/))', message: 'Schemas import zod and constants of shared/domain.' },
  ]),
  rule('shared-utils', ['shared/utils/**/*.ts', 'shared/types/**/*.ts'], [vue, anyServer, h3]),
  rule('database', ['server/database/**/*.ts'], [
    { regex: serverPart('services', 'api', 'jobs', 'ehr', 'mail', 'utils', 'plugins', 'middleware'), message: 'The database knows nothing above it.' },
    h3,
  ], ['server/database/seed/**']),
  rule('ehr', ['server/ehr/**/*.ts'], [
    { regex: serverPart('services', 'mail', 'database', 'jobs', 'api'), message: 'server/ehr imports its library and shared code: never services, never mail.' },
    h3,
  ]),
  rule('mail', ['server/mail/**/*.ts'], [
    { regex: serverPart('services', 'ehr', 'database', 'jobs', 'api'), message: 'server/mail imports its library and shared code: never services, never the record.' },
    h3,
  ]),
  rule('services', ['server/services/**/*.ts'], [
    h3,
    { regex: serverPart('api', 'middleware', 'plugins'), message: 'Services stand below the routes.' },
    { regex: serverPart('jobs/(?!queue$)[^/]+'), message: 'Services add jobs through jobs/queue alone.' },
  ]),
  rule('routes', ['server/api/**/*.ts', 'server/jobs/**/*.ts'], [
    { regex: serverPart('database'), message: 'Routes and jobs call services; only services reach the database.' },
    { regex: '^(drizzle-orm|pg)(/|$)', message: 'Routes and jobs call services; only services reach the database.' },
  ], ['server/jobs/queue.ts']),
  rule('base', ['components/base/**', 'components/form/**'], [
    anyServer,
    upward,
    {
      regex: '^(#shared/(?!utils/)|~/(stores|composables)/|~/components/(?!base/|form/))',
      message: 'Base and form components know no domain words and fetch nothing.',
    },
    { regex: '^(\\.\\./)+(?!base/|form/|\\.\\./)[a-z]+/', message: 'Base and form components know no domain words and fetch nothing.' },
  ]),
  rule('screens', ['app.vue', 'error.vue', 'pages/**', 'layouts/**', 'components/**', 'composables/**', 'stores/**', 'middleware/**'], [anyServer, upward, h3], [
    'components/base/**',
    'components/form/**',
  ]),
  rule('stores', ['stores/**', 'composables/**'], [
    anyServer,
    upward,
    h3,
    { regex: '^~/components/', message: 'Imports go downward: a store or composable knows no component.' },
  ]),
]
