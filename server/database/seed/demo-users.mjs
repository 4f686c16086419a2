/**
 * Who can sign in to the demonstration department. Everybody here is invented. The start script prints this list and tests sign
 * in with it; outside the demo setting the server refuses every one of them.
 */

/** The one pass phrase of all demo sign-ins. */
export const demoPassPhrase = 'harbor lantern quiet meadow'

export const demoPractices = /** @type {const} */ ([
  { name: 'Millbrook Family Practice', phone: '555 0110' },
  { name: 'Riverside Medicine', phone: '555 0121' },
  { name: 'Hill Street Clinic', phone: '555 0133' },
  { name: 'Northgate Orthopaedics', phone: '555 0147' },
])

/**
 * @typedef {object} DemoUser
 * @property {string} name
 * @property {string} email
 * @property {'orderer' | 'radiologist' | 'scheduler' | 'administrator'} role
 * @property {boolean} maySign
 * @property {boolean} guidanceLead
 * @property {string[]} practices names out of `demoPractices`
 * @property {string} does one line for the list of sign-ins
 */

/** @type {DemoUser[]} */
export const demoUsers = [
  { name: 'Dr Ines Okafor', email: 'ines.okafor@millbrook.example', role: 'orderer', maySign: true, guidanceLead: false, practices: ['Millbrook Family Practice'], does: 'orders and signs, Millbrook Family Practice' },
  { name: 'Sam Whitfield', email: 'sam.whitfield@millbrook.example', role: 'orderer', maySign: false, guidanceLead: false, practices: ['Millbrook Family Practice'], does: 'prepares requests, Millbrook Family Practice' },
  { name: 'Dr Priya Raman', email: 'priya.raman@riverside.example', role: 'orderer', maySign: true, guidanceLead: false, practices: ['Riverside Medicine'], does: 'orders and signs, Riverside Medicine' },
  { name: 'Dr Jonas Weiss', email: 'jonas.weiss@hillstreet.example', role: 'orderer', maySign: true, guidanceLead: false, practices: ['Hill Street Clinic'], does: 'orders and signs, Hill Street Clinic' },
  { name: 'Dr Amara Diallo', email: 'amara.diallo@northgate.example', role: 'orderer', maySign: true, guidanceLead: false, practices: ['Northgate Orthopaedics'], does: 'orders and signs, Northgate Orthopaedics' },
  { name: 'Dr Tomas Brandt', email: 'tomas.brandt@northshore.example', role: 'radiologist', maySign: true, guidanceLead: false, practices: [], does: 'radiologist, decides requests' },
  { name: 'Dr Helen Marsh', email: 'helen.marsh@northshore.example', role: 'radiologist', maySign: true, guidanceLead: true, practices: [], does: 'radiologist and guidance lead' },
  { name: 'Leila Farouk', email: 'leila.farouk@northshore.example', role: 'scheduler', maySign: false, guidanceLead: false, practices: [], does: 'books and prepares exams' },
  { name: 'Ruth Adler', email: 'ruth.adler@northshore.example', role: 'administrator', maySign: false, guidanceLead: false, practices: [], does: 'accounts, practices, connections, audit trail' },
]

/** The list as the start script shows it. */
export function describeSignIns() {
  const width = Math.max(...demoUsers.map(({ email }) => email.length))
  return [
    `Sign in with any of these; the pass phrase of each is: ${demoPassPhrase}`,
    ...demoUsers.map(({ email, name, does }) => `  ${email.padEnd(width)}  ${name}, ${does}`),
  ].join('\n')
}
