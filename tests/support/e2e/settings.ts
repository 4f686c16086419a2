/** A setting that `scripts/test.mjs` hands over. @throws Error where the tests run without it */
export function setting(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: run these tests with "npm run test:e2e".`)
  return value
}

export const origin = (): string => setting('WHEREFORE_TEST_BASE_URL')
