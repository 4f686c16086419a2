/**
 * The demonstration's sign-ins as the sign-in page offers them; the same people as the demonstration's seed, which a test
 * checks. Read only while rendering on a server with the demo setting on, so that no other browser ever gets the list.
 */
export interface DemoSignIn { email: string, name: string, does: string }

export const demoPassPhrase = 'harbor lantern quiet meadow'

export const demoSignIns: readonly DemoSignIn[] = [
  { email: 'ines.okafor@millbrook.example', name: 'Dr Ines Okafor', does: 'orders and signs' },
  { email: 'sam.whitfield@millbrook.example', name: 'Sam Whitfield', does: 'prepares requests' },
  { email: 'tomas.brandt@northshore.example', name: 'Dr Tomas Brandt', does: 'radiologist' },
  { email: 'helen.marsh@northshore.example', name: 'Dr Helen Marsh', does: 'radiologist, guidance lead' },
  { email: 'leila.farouk@northshore.example', name: 'Leila Farouk', does: 'books and prepares' },
  { email: 'ruth.adler@northshore.example', name: 'Ruth Adler', does: 'administrator' },
]
