import { commonWords } from './common-words'

/** Letters, digits and signs alike; spaces count. NIST SP 800-63B 4, 3.1.1.2: 15 where a password is the only factor. */
export const leastPasswordLength = 15

export interface PasswordOwner { name: string, email: string, department: string }

/** How people disguise letters in words that are on every guesser's list. */
const disguises: Record<string, string> = { 0: 'o', 1: 'l', 3: 'e', 4: 'a', 5: 's', 7: 't', '@': 'a', '$': 's', '!': 'i' }

const rows = ['abcdefghijklmnopqrstuvwxyz', '01234567890', 'qwertyuiop', 'asdfghjkl', 'zxcvbnm', 'qazwsxedcrfvtgbyhnujmikolp', '1qaz2wsx3edc4rfv5tgb6yhn']
const runs = rows.flatMap(row => [row, [...row].reverse().join('')])

/** Fewer letters and digits than this, beyond the words and runs on every list, are guessed at once. */
const leastOwn = 5

/**
 * Why a new password is too easy to guess, in words for the person who chose it; null where it is not. Any character may be in
 * it, and none must.
 */
export function judgePassword(password: string, owner: PasswordOwner): string | null {
  const normal = password.normalize('NFKC')
  if ([...normal].length < leastPasswordLength) return `Use at least ${leastPasswordLength} characters; a few words in a row are fine.`
  const plain = normal.toLowerCase()
  const theirs = ownWords(owner).find(word => plain.includes(word))
  if (theirs) return 'This holds your name, your address, the department or this program\'s name: guessers try those first. Choose other words.'
  if (new Set(plain).size < 6 || isRepeated(plain)) return 'This repeats itself, which guessers try first. Choose different words.'
  if (ownCharacters(plain) < leastOwn || ownCharacters(undisguised(plain)) < leastOwn) {
    return 'This is made of words and runs of keys that are on every guesser\'s list. Add words of your own.'
  }
  return null
}

function ownWords({ name, email, department }: PasswordOwner): string[] {
  const parts = [...name.split(/\s+/), email.split('@')[0] ?? '', ...email.split(/[@._-]/), ...department.split(/\s+/), 'wherefore']
  return parts.map(part => part.normalize('NFKC').toLowerCase()).filter(part => part.length >= 4)
}

function isRepeated(text: string): boolean {
  const half = Math.floor(text.length / 2)
  for (let period = 1; period <= half; period++) {
    if ([...text].every((letter, at) => at < period || letter === text[at - period])) return true
  }
  return false
}

function undisguised(text: string): string {
  return text.replace(/[0134570@$!]/g, sign => disguises[sign] ?? sign)
}

/** Counts the letters and digits left when listed words, years and runs of neighboring keys are taken out. */
function ownCharacters(text: string): number {
  let rest = text
  for (const word of commonWords) rest = rest.replaceAll(word, ' ')
  rest = withoutRuns(rest).replace(/(?:19|20)\d\d/g, ' ')
  return rest.replace(/[^\p{L}\p{N}]/gu, '').length
}

function withoutRuns(text: string): string {
  let rest = ''
  for (let at = 0; at < text.length;) {
    let length = 4
    while (at + length <= text.length && runs.some(run => run.includes(text.slice(at, at + length)))) length += 1
    if (length > 4) {
      rest += ' '
      at += length - 1
    }
    else {
      rest += text[at]
      at += 1
    }
  }
  return rest
}
