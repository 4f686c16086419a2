import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
// Makes the server build carry next-auth's core folder along; nothing is used of it here.
import 'next-auth/next'

/**
 * @sidebase/nuxt-auth imports `next-auth/core`, which next-auth stopped exporting in 4.23 while keeping the file. This module
 * stands in for it (see `nitro.alias` in nuxt.config.ts): it reaches the file beside one that is still exported.
 */
const require = createRequire(import.meta.url)
const core = require(join(dirname(require.resolve('next-auth/jwt')), '..', 'core', 'index.js'))

export const AuthHandler = core.AuthHandler
