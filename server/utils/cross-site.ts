/** What the guard looks at of a call. Header names as HTTP gives them, lower case. */
export interface CallFacts {
  method: string
  path: string
  /** Our own public address. */
  origin: string
  header: (name: string) => string | undefined
}

const reading = new Set(['GET', 'HEAD', 'OPTIONS'])

/** Sent by programs that are no browser and so send neither Sec-Fetch-Site nor Origin. */
export const clientHeader = 'x-wherefore-client'

/**
 * Whether a call that changes something may have been caused by another site: denied unless it is clearly ours.
 *
 * @returns null where it may go on, otherwise the status and why.
 */
export function judgeCall({ method, path, origin, header }: CallFacts): { status: 403 | 415, detail: string } | null {
  if (reading.has(method)) return null
  const site = header('sec-fetch-site')
  const from = header('origin')
  const foreign = { status: 403, detail: 'This call did not come from a page of ours.' } as const
  if (site !== undefined) {
    if (site !== 'same-origin' && site !== 'none') return foreign
  }
  else if (from !== undefined) {
    // Our pages send no referrer, so an older browser may hide where a form comes from; the link's token in the address, which no
    // other site knows, then stands for it.
    if (from !== origin && !(from === 'null' && isPatientForm(path))) return foreign
  }
  else if (header(clientHeader) === undefined && !isSignIn(path)) {
    return foreign
  }
  // Signing in and out has a forgery guard of its own and sends forms.
  if (isSignIn(path)) return null
  const type = header('content-type')?.split(';')[0]?.trim().toLowerCase()
  if (isPatientForm(path)) return type === 'application/x-www-form-urlencoded' ? null : { status: 415, detail: 'Only a form is read here.' }
  if (type !== 'application/json') return { status: 415, detail: 'Only JSON is read here.' }
  return null
}

function isSignIn(path: string): boolean {
  return path.startsWith('/api/auth/')
}

/** The patient's page must work without scripts, so this one route takes a plain form. */
function isPatientForm(path: string): boolean {
  return path.startsWith('/explanation-form/')
}
