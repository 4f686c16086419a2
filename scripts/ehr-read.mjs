#!/usr/bin/env node
// Prints one patient's kidney function from the configured hospital record: `npm run ehr:read -- <record number or Patient/id>`.
// Standard output carries JSON alone; words for a person go to standard error.
import { fileURLToPath } from 'node:url'
import { runnerImport } from 'vite'

const root = fileURLToPath(new URL('..', import.meta.url))
const path = name => fileURLToPath(new URL(`../${name}`, import.meta.url))

// The same sources as the server's, run without a build.
const { module } = await runnerImport(path('server/ehr/ehr-read.ts'), {
  configFile: false,
  envFile: false,
  root,
  logLevel: 'silent',
  resolve: { alias: { '#shared': path('shared'), '#server': path('server') } },
})

const { exitCode, report, words } = await module.ehrRead(process.argv.slice(2), process.env, new Date())
if (report) process.stdout.write(`${JSON.stringify(report, null, 2)}\n`)
process.stderr.write(`${words}\n`)
process.exitCode = exitCode
